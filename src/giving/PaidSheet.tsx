// A gift that came: thanks, what it builds, and where the receipt is. It asks for nothing.
import { Link } from 'react-router-dom';
import type { GiveOutcome } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { AnswerRow } from '#src/ui/AnswerRow.tsx';
import { inSentence } from '#shared/campaign/name-rules.ts';
import { SharesList } from './SharesList.tsx';

function thanksWords({ sumPence, inMemory, campaignName }: GiveOutcome): string {
  const sum = formatPence(sumPence);
  return inMemory
    ? `Your gift of ${sum} in memory has come safely. The name will be kept with it.`
    : `Your gift of ${sum} to ${inSentence(campaignName)} has come safely.`;
}

export function PaidSheet({ outcome }: { outcome: GiveOutcome }) {
  const { email, giftAidPence, pronoun, receiptNumber, receiptPath } = outcome;
  return (
    <>
      <p className="lead">{thanksWords(outcome)}</p>
      <div className="sheet check">
        <dl className="answers">
          <AnswerRow name="Gift">{formatPence(outcome.sumPence)}</AnswerRow>
          <AnswerRow name="What it builds">
            <SharesList shares={outcome.shares} splitNote={outcome.splitNote} />
          </AnswerRow>
          {giftAidPence > 0 ? (
            <AnswerRow name="Gift Aid adds">
              {formatPence(giftAidPence)}, which we claim for {pronoun} from the tax office
            </AnswerRow>
          ) : null}
          <AnswerRow name="Receipt">
            {receiptPath ? (
              <Link to={receiptPath}>{receiptNumber ? `Receipt ${receiptNumber}` : 'Your receipt'}</Link>
            ) : null}
            {email ? ` It also goes to ${email}.` : null}
          </AnswerRow>
        </dl>
      </div>
    </>
  );
}
