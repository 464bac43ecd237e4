// The card service has not said yet whether the gift was paid: what is known, and what happens next.
import type { GiveOutcome } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';

type Props = { outcome: GiveOutcome; intentId: string };

export function StillConfirming({ outcome, intentId }: Props) {
  const again = `/give/done?gift=${encodeURIComponent(intentId)}`;
  return (
    <>
      <p className="lead">
        Our card service has not yet told us whether your gift of {formatPence(outcome.sumPence)} was paid.
        Often this takes a minute; some banks take longer.
      </p>
      <h2>What happens next</h2>
      <ul className="plain">
        <li>You need do nothing, and you may close this page.</li>
        <li>
          As soon as it is paid, your receipt goes to {outcome.email ?? 'the e-mail address you gave us'}.
        </li>
        <li>If it is not paid, nothing is taken. Please do not pay a second time meanwhile.</li>
      </ul>
      <p>
        <a className="button plain" href={again}>
          Look again
        </a>
      </p>
    </>
  );
}
