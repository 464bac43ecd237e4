// Moves the clock, and hurries what would come by itself.
import { formatMoment } from '../pages/words.ts';

type Props = { now: Date; isMoved: boolean };

function Press({ action, words }: { action: string; words: string }) {
  return (
    <form method="post" action={action}>
      <button className="plain">{words}</button>
    </form>
  );
}

export function ClockForms({ now, isMoved }: Props) {
  return (
    <section className="sheet" aria-labelledby="clock-heading">
      <h2 id="clock-heading">Clock</h2>
      <p>
        It is <strong>{formatMoment(now)}</strong>
        {isMoved ? ' on the moved clock.' : ', the real time.'}
      </p>
      <form className="row" method="post" action="/page/clock/days">
        <div>
          <label className="head" htmlFor="days">
            Move on by days
          </label>
          <input id="days" name="days" type="number" step="any" defaultValue={1} />
        </div>
        <button>Move on</button>
      </form>
      <form className="row" method="post" action="/page/clock/to">
        <div>
          <label className="head" htmlFor="to">
            Set to a moment (Greenwich time)
          </label>
          <input id="to" name="to" type="datetime-local" defaultValue={now.toISOString().slice(0, 16)} />
        </div>
        <button>Set</button>
      </form>
      <div className="row">
        <Press action="/page/clock/reset" words="Back to now" />
        <Press action="/page/fees" words="Give fees now" />
        <Press action="/page/confirm" words="Confirm slow payments now" />
        <Press action="/page/fail" words="Fail slow payments now" />
      </div>
    </section>
  );
}
