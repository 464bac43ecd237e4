// What the card service calls the payment, so that it can be found there.
import type { GiftChain } from '#shared/giving/desk-schemas.ts';

export function CardFacts({ payment }: { payment: GiftChain['payment'] }) {
  const facts = [
    ['Card page', payment.sessionId],
    ['Payment', payment.paymentIntentId],
    ['Charge', payment.chargeId],
    ['Balance line', payment.balanceTransactionId],
  ] as const;
  return (
    <>
      {payment.feePence === null && (
        <p className="ash small pad">The card fee is not told yet; it comes after the payment.</p>
      )}
      <dl className="ids">
        {facts.map(([name, id]) => (
          <div key={name}>
            <dt>{name}</dt>
            <dd>{id ?? 'not told yet'}</dd>
          </div>
        ))}
      </dl>
    </>
  );
}
