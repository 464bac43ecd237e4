// Says how events are carried to the site, and lets them be carried badly.
import type { WebhookMode } from '../state/rows.ts';

type Props = { mode: WebhookMode; webhookUrl: string | null };
type NumberProps = { name: string; label: string; value: number };
type TickProps = { name: string; label: string; isOn: boolean };

function NumberField({ name, label, value }: NumberProps) {
  return (
    <div className="field">
      <label className="head" htmlFor={name}>
        {label}
      </label>
      <input id={name} name={name} type="number" min={0} defaultValue={value} />
    </div>
  );
}

function Tick({ name, label, isOn }: TickProps) {
  return (
    <div className="choice">
      <input id={name} name={name} type="checkbox" defaultChecked={isOn} />
      <label htmlFor={name}>{label}</label>
    </div>
  );
}

const numberOf = (count: number | 'all'): number => (count === 'all' ? 0 : count);

export function CourierForms({ mode, webhookUrl }: Props) {
  return (
    <section className="sheet" aria-labelledby="courier-heading">
      <h2 id="courier-heading">Messages to the site</h2>
      <p className="ash">
        {webhookUrl ? `Sent to ${webhookUrl}` : 'No address was given, so nobody is told.'}
      </p>
      <form method="post" action="/page/mode">
        <div className="pair">
          <NumberField name="drop" label="Drop the next" value={numberOf(mode.dropNext)} />
          <NumberField name="double" label="Double the next" value={numberOf(mode.doubleNext)} />
          <NumberField name="reorder" label="Turn round the next" value={mode.reorderNext} />
          <NumberField
            name="delaySeconds"
            label="Delay each, seconds"
            value={Math.round(mode.delayMs / 1000)}
          />
        </div>
        <fieldset>
          <legend>Until changed</legend>
          <Tick name="dropAll" label="Drop every one" isOn={mode.dropNext === 'all'} />
          <Tick name="paused" label="Hold everything back" isOn={mode.paused} />
        </fieldset>
        <div className="row">
          <button>Set</button>
          <button className="plain" formAction="/page/flush">
            Send what waits now
          </button>
          <button className="plain" formAction="/page/calm">
            Carry them well again
          </button>
        </div>
      </form>
    </section>
  );
}
