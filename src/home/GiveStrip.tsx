// How much: the first question of the gift sheet, asked where the reader stands.
import { useState, type ChangeEvent } from 'react';
import { Form } from 'react-router-dom';
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';
import { add, applyRate, formatPence, pence, type Pence } from '#shared/money.ts';
import { readSum } from '#shared/sum-text.ts';
import { SumRow } from '#src/ui/SumRow.tsx';
import { inSentence } from './part-words.ts';
import { nextPart } from './reach-words.ts';

const SUMS = [
  { value: '5', words: '£5' },
  { value: '20', words: '£20' },
  { value: '60', words: '£60' },
] as const;
const OTHER = 'other';
const GIFT_AID = { per: 25, of: 100 };

function chosenPence(choice: string, other: string): Pence | null {
  if (choice !== OTHER) return pence(Number(choice) * 100);
  const reading = readSum(other);
  return reading.kind === 'sum' && reading.pence > 0 ? reading.pence : null;
}

/** Writing a sum is choosing it. */
function chooseOther({ target }: ChangeEvent<HTMLInputElement>): void {
  const radio = target.form?.querySelector<HTMLInputElement>(`input[name="amount"][value="${OTHER}"]`);
  if (radio) radio.checked = true;
}

export function GiveStrip({ campaign }: { campaign: Campaign }) {
  const [choice, setChoice] = useState('20');
  const [other, setOther] = useState('');
  const sum = chosenPence(choice, other);
  const next = nextPart(campaign);
  return (
    <Form className="callgive" action="/give" method="get">
      <SumRow
        legend="How much"
        sums={SUMS}
        chosen="20"
        otherValue={OTHER}
        radio={{ name: 'amount', onChange: ({ target }) => setChoice(target.value) }}
        other={{
          name: 'other',
          onChange: (event) => {
            chooseOther(event);
            setChoice(OTHER);
            setOther(event.target.value);
          },
        }}
      />
      <div className="buttons">
        <button className="button">Give</button>
        <span className="small ash">
          {campaign.giftAidOffered && sum !== null && (
            <>
              With Gift Aid your {formatPence(sum)} is {formatPence(add(sum, applyRate(sum, GIFT_AID)))} to{' '}
              {campaign.pronoun}.
              <br />
            </>
          )}
          {next && <>Next to be paid: {inSentence(next.name)}.</>}
        </span>
      </div>
    </Form>
  );
}
