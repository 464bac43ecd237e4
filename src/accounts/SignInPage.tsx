// The door of the desk: address and password.
import { useQuery } from '@tanstack/react-query';
import { Navigate, useSearchParams } from 'react-router-dom';
import { useApi } from '#src/lib/use-api.ts';
import { ownPath } from './account-paths.ts';
import { sessionQuery } from './accounts-queries.ts';
import { doorOf } from './doors.ts';
import { SignInForm } from './SignInForm.tsx';

export function SignInPage() {
  const [params] = useSearchParams();
  const next = ownPath(params.get('next'));
  const step = useQuery(sessionQuery(useApi())).data?.step ?? 'signed-out';
  if (step !== 'signed-out') return <Navigate to={doorOf(step, next) ?? next} replace />;
  return (
    <main className="sheet" id="sheet">
      <div className="title">
        <h1>Sign in</h1>
        <p>For the society’s own people</p>
      </div>
      {params.has('left') && (
        <p className="told" role="status">
          You have left the desk. Nothing stays open in this browser.
        </p>
      )}
      <SignInForm />
      <p className="ash door-note">
        Whoever tries too often waits a little before the next try. Nobody is locked out for good.
      </p>
    </main>
  );
}
