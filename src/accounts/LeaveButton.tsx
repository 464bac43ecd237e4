// Leaves the desk: the session ends at the server, and the window forgets what it showed.
import type { ReactNode } from 'react';
import { accountPaths } from './account-paths.ts';
import { useLeaveDesk } from './accounts-queries.ts';

export function LeaveButton({ children }: { children: ReactNode }) {
  const leave = useLeaveDesk(`${accountPaths.signIn}?left`);
  return (
    <>
      <button type="button" className="act word" onClick={() => leave.mutate()}>
        {children}
      </button>
      {leave.isError && (
        <span className="overdue" role="alert">
          {' '}
          That did not reach the desk: you are still signed in. Try again.
        </span>
      )}
    </>
  );
}
