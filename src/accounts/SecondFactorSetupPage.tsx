// Sets up the second factor: prove who you are, scan the picture, write its first code, keep the recovery codes.
import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import type { SecondFactorOffer } from '#shared/accounts/session-schemas.ts';
import { useApi } from '#src/lib/use-api.ts';
import { accountPaths, ownPath } from './account-paths.ts';
import { accountQuery, sessionQuery } from './accounts-queries.ts';
import { BeginSetup } from './BeginSetup.tsx';
import { ConfirmCodeForm } from './ConfirmCodeForm.tsx';
import { doorOf } from './doors.ts';
import { ProveAgainForm } from './ProveAgainForm.tsx';
import { RecoveryCodes } from './RecoveryCodes.tsx';
import { ScanPicture } from './ScanPicture.tsx';

function FirstStep({
  isSignedIn,
  onOffer,
}: {
  isSignedIn: boolean;
  onOffer: (offer: SecondFactorOffer) => void;
}) {
  const account = useQuery({ ...accountQuery(useApi()), enabled: isSignedIn });
  if (!isSignedIn) return <BeginSetup onOffer={onOffer} />;
  if (!account.data) return null;
  const { isOn } = account.data.secondFactor;
  return (
    <>
      <p className="lead-in">
        {isOn
          ? 'A new picture takes the place of the one in use. The old app stops opening the desk.'
          : 'From then on a code from your telephone is asked beside the password.'}
      </p>
      <ProveAgainForm hasCode={isOn} onOffer={onOffer} />
    </>
  );
}

export function SecondFactorSetupPage() {
  const [params] = useSearchParams();
  const next = ownPath(params.get('next'));
  const navigate = useNavigate();
  const step = useQuery(sessionQuery(useApi())).data?.step ?? 'signed-out';
  const [offer, setOffer] = useState<SecondFactorOffer | null>(null);
  const [codes, setCodes] = useState<readonly string[] | null>(null);
  if (step === 'signed-out' || step === 'second-factor')
    return <Navigate to={doorOf(step, accountPaths.secondFactorSetup) ?? accountPaths.desk} replace />;
  return (
    <main className="sheet" id="sheet">
      <div className="title">
        <h1>Second factor</h1>
        <p>A code from your telephone</p>
      </div>
      {codes !== null ? (
        <RecoveryCodes codes={codes} onKept={() => void navigate(next)} button="I have kept them: go on" />
      ) : offer === null ? (
        <FirstStep isSignedIn={step === 'signed-in'} onOffer={setOffer} />
      ) : (
        <>
          <ScanPicture offer={offer} />
          <ConfirmCodeForm onCodes={setCodes} />
        </>
      )}
    </main>
  );
}
