// One choice: how the mail server behaves from now on.
import { PAGE_CHOICES, type Mode, type PageChoice } from '../modes.ts';

type Props = { chosen: PageChoice | null; mode: Mode };

const CHOICES = Object.entries(PAGE_CHOICES);

export function ModeForm({ chosen, mode }: Props) {
  return (
    <form className="mode" method="post" action="/mode">
      <label htmlFor="choice">How this mail server behaves</label>
      <div className="row">
        <select id="choice" name="choice" defaultValue={chosen ?? 'own'}>
          {chosen === null && (
            <option value="own" disabled>
              As it was told: {JSON.stringify(mode)}
            </option>
          )}
          {CHOICES.map(([name, { label }]) => (
            <option key={name} value={name}>
              {label}
            </option>
          ))}
        </select>
        <button>Behave so</button>
      </div>
    </form>
  );
}
