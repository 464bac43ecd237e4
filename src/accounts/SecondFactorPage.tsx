// The second lock: a code that only the person's own telephone knows.
import { useQuery } from '@tanstack/react-query';
import { Navigate, useSearchParams } from 'react-router-dom';
import { useApi } from '#src/lib/use-api.ts';
import { ownPath } from './account-paths.ts';
import { sessionQuery } from './accounts-queries.ts';
import { doorOf } from './doors.ts';
import { LeaveButton } from './LeaveButton.tsx';
import { SecondFactorForm } from './SecondFactorForm.tsx';

export function SecondFactorPage() {
  const [params] = useSearchParams();
  const next = ownPath(params.get('next'));
  const step = useQuery(sessionQuery(useApi())).data?.step ?? 'signed-out';
  if (step !== 'second-factor') return <Navigate to={doorOf(step, next) ?? next} replace />;
  return (
    <main className="sheet" id="sheet">
      <div className="title">
        <h1>One more proof</h1>
        <p>The password was right</p>
      </div>
      <SecondFactorForm />
      <p className="ash door-note">
        Not you? <LeaveButton>Begin again</LeaveButton>
      </p>
    </main>
  );
}
