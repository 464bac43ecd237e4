// What is given, of what, by how many, and what is still to find: one sentence, no tiles.
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';
import { add, NOTHING } from '#shared/money.ts';
import { MoneyText } from '#src/ui/MoneyText.tsx';
import { inSentence } from './part-words.ts';
import { nextPart } from './reach-words.ts';

const count = new Intl.NumberFormat('en-GB');

export function SumSentence({ campaign }: { campaign: Campaign }) {
  const { givenPence, goalPence, givers, parts, reach } = campaign;
  const next = nextPart(campaign);
  const stillPence = add(NOTHING, ...parts.map((part) => part.stillNeededPence));
  const inKindPence = add(NOTHING, ...parts.flatMap((part) => part.inKind.map((one) => one.amountPence)));
  return (
    <div className="sum">
      <p>
        <b>
          <MoneyText pence={givenPence} />
        </b>{' '}
        given of <MoneyText pence={goalPence} />, by {count.format(givers)}{' '}
        {givers === 1 ? 'giver' : 'givers'}.{' '}
        {stillPence > 0 ? (
          <>
            <b>
              <MoneyText pence={stillPence} />
            </b>{' '}
            still to find.
          </>
        ) : (
          'Every part is paid for.'
        )}
      </p>
      {inKindPence > 0 && (
        <p className="aside">
          <MoneyText pence={inKindPence} /> more is met in kind, by firms named below.
        </p>
      )}
      {reach.waitingPence > 0 && (
        <p className="aside">
          <MoneyText pence={reach.waitingPence} /> of what is given is meant for parts above{' '}
          {next ? `${inSentence(next.name)}, which is being paid for now` : 'the one being paid for now'}. It
          lifts the line when the line gets there.
        </p>
      )}
    </div>
  );
}
