// A gift that was not paid: nothing was taken, nothing that was written is lost, and how to try again.
import { Link } from 'react-router-dom';
import type { GiveOutcome } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';

export function NotPaid({ outcome }: { outcome: GiveOutcome }) {
  return (
    <>
      <p className="lead">
        Nothing was taken. Your gift of {formatPence(outcome.sumPence)} was refused or not finished on the
        card page, and every answer you wrote is still here.
      </p>
      <div className="buttons">
        <Link className="button" to="/give/check">
          Try again
        </Link>
        <Link to="/give">Change an answer first</Link>
      </div>
      <p className="sans small">
        If your card is refused again, another card may work; your bank can say why it was.
      </p>
    </>
  );
}
