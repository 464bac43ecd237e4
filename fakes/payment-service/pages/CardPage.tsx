// The card page: what is being paid, a choice of test cards, and the fields a card has.
import { TEST_CARDS } from '../test-cards.ts';
import { CardFields } from './CardFields.tsx';
import type { CardFaults } from './CardFields.tsx';
import { Sheet } from './Sheet.tsx';
import { spaced } from './words.ts';

export type CardPageProps = {
  action: string;
  sum: string;
  items: readonly string[];
  description: string | null;
  cancelUrl: string | null;
  chosen: string;
  expiry: string;
  code: string;
  faults: CardFaults;
  /** Why the last card was not taken. */
  refusal: string | null;
};

function Faults({ faults, refusal }: Pick<CardPageProps, 'faults' | 'refusal'>) {
  const entries = Object.entries(faults);
  if (entries.length === 0 && !refusal) return null;
  return (
    <div className="faults" role="alert">
      <h2>{refusal ? 'Not paid' : 'Please look at this again'}</h2>
      {refusal && <p>{refusal} Nothing was taken. You can choose another card and try again.</p>}
      <ul hidden={entries.length === 0}>
        {entries.map(([field, words]) => (
          <li key={field}>
            <a href={`#${field}`}>{words}</a>
          </li>
        ))}
      </ul>
    </div>
  );
}

function Cards({ chosen }: { chosen: string }) {
  return (
    <fieldset>
      <legend>Choose a test card</legend>
      {TEST_CARDS.map(({ number, label }) => (
        <div className="choice" key={number}>
          <input
            type="radio"
            name="card"
            id={`card-${number}`}
            value={number}
            data-number={spaced(number)}
            defaultChecked={number === chosen}
          />
          <label htmlFor={`card-${number}`}>
            {label}
            <span>{spaced(number)}</span>
          </label>
        </div>
      ))}
    </fieldset>
  );
}

export function CardPage(props: CardPageProps) {
  const { action, sum, items, description, cancelUrl, faults, refusal } = props;
  const hasFaults = refusal !== null || Object.keys(faults).length > 0;
  return (
    <Sheet title={`${hasFaults ? 'Error: ' : ''}Pay ${sum} by card`} script="/pay/card-page.js">
      <h1>Pay by card</h1>
      <Faults faults={faults} refusal={refusal} />
      <form className="sheet" method="post" action={action} noValidate>
        <div className="sum">
          <span>{items.join(', ')}</span>
          <strong>{sum}</strong>
        </div>
        {description && <p className="ash">{description}</p>}
        <Cards chosen={props.chosen} />
        <CardFields expiry={props.expiry} code={props.code} faults={faults} />
        <button className="full">Pay {sum}</button>
      </form>
      {cancelUrl && (
        <p>
          <a href={cancelUrl}>Go back without paying</a>
        </p>
      )}
    </Sheet>
  );
}
