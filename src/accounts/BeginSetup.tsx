// For whoever must set up a second factor before the desk opens: why, and the way to begin.
import type { SecondFactorOffer } from '#shared/accounts/session-schemas.ts';
import { Trouble } from '#src/ui/Trouble.tsx';
import { useBeginSecondFactor } from './accounts-queries.ts';
import { LeaveButton } from './LeaveButton.tsx';

export function BeginSetup({ onOffer }: { onOffer: (offer: SecondFactorOffer) => void }) {
  const begin = useBeginSecondFactor();
  return (
    <>
      <p className="lead-in">
        Your roles can move money or people, so a password alone does not open the desk. Have your telephone
        at hand, with any app for one-time codes on it. It takes two minutes, once.
      </p>
      {begin.isError && <Trouble heading="The picture did not come. Try again in a moment." />}
      <p className="buttons">
        <button
          type="button"
          className="button"
          onClick={() => begin.mutate({}, { onSuccess: (offer) => onOffer(offer) })}
        >
          Show the picture
        </button>
      </p>
      <p className="ash door-note">
        No telephone here? <LeaveButton>Leave, and come back with it</LeaveButton>
      </p>
    </>
  );
}
