// The second page of a card that asks: is it you?
import { Sheet } from './Sheet.tsx';

type Props = { action: string; sum: string; lastFour: string };

export function ConfirmPage({ action, sum, lastFour }: Props) {
  return (
    <Sheet title={`Confirm it is you: ${sum}`}>
      <h1>Confirm it is you</h1>
      <form className="sheet" method="post" action={action}>
        <p>
          The bank of the test card ending {lastFour} asks whether it is you who pays <strong>{sum}</strong>.
        </p>
        <div className="row">
          <button name="answer" value="confirm">
            Yes, it is me
          </button>
          <button className="plain" name="answer" value="leave">
            Leave it
          </button>
        </div>
      </form>
    </Sheet>
  );
}
