// Who I am at the desk, what proves it, and how to change that.
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { Account } from '#shared/accounts/session-schemas.ts';
import { formatMoment } from '#shared/dates.ts';
import { useApi } from '#src/lib/use-api.ts';
import { AskAgain } from '#src/ui/AskAgain.tsx';
import { WaitingRows } from '#src/ui/WaitingRows.tsx';
import { accountPaths, withNext } from './account-paths.ts';
import { accountQuery } from './accounts-queries.ts';
import { ChangePasswordForm } from './ChangePasswordForm.tsx';
import { RenewCodesForm } from './RenewCodesForm.tsx';
import { roleWords } from './role-words.ts';

/** That none is left is said, with what to do about it, above the form that makes new ones. */
const codesLeft = (count: number): string =>
  count === 0 ? '' : count === 1 ? '. One recovery code is left' : `. ${count} recovery codes are left`;

function Facts({ account }: { account: Account }) {
  const { secondFactor } = account;
  return (
    <dl className="facts">
      <div>
        <dt>Name</dt>
        <dd>{account.name}</dd>
      </div>
      <div>
        <dt>E-mail address</dt>
        <dd>{account.email}</dd>
      </div>
      <div>
        <dt>Roles</dt>
        <dd>
          {roleWords(account.roles)}
          {account.isTrustee && '; a trustee'}
        </dd>
      </div>
      <div>
        <dt>Second factor</dt>
        <dd>
          {secondFactor.since === null
            ? 'not set up'
            : `set up on ${formatMoment(new Date(secondFactor.since))}${codesLeft(secondFactor.recoveryCodesLeft)}`}
          {'. '}
          <Link to={withNext(accountPaths.secondFactorSetup, accountPaths.account)}>
            {secondFactor.isOn ? 'Move it to another telephone' : 'Set it up'}
          </Link>
        </dd>
      </div>
    </dl>
  );
}

export function AccountPage() {
  const answer = useQuery(accountQuery(useApi()));
  const account = answer.data;
  return (
    <>
      <main className="sheet" id="sheet" tabIndex={-1}>
        <div className="title">
          <h1>My account</h1>
          <p>Who you are here, and what proves it</p>
        </div>
        {answer.isPending && <WaitingRows words="Your account is being looked up." />}
        {answer.isError && !account && (
          <AskAgain what="Your account" error={answer.error} onAgain={() => void answer.refetch()} />
        )}
        {account && (
          <>
            <Facts account={account} />
            {account.secondFactor.isOn && (
              <section className="sec" aria-labelledby="codes">
                <h2 id="codes">Recovery codes</h2>
                {account.secondFactor.recoveryCodesLeft === 0 && (
                  <p className="overdue">
                    No recovery code is left. Make new ones, so that a lost phone does not lock you out.
                  </p>
                )}
                <RenewCodesForm />
              </section>
            )}
            <section className="sec" aria-labelledby="password">
              <h2 id="password">Password</h2>
              <ChangePasswordForm email={account.email} />
            </section>
          </>
        )}
      </main>
      <aside className="margin" aria-label="Notes">
        <h2>Good to know</h2>
        <p className="note">
          An hour without a touch, or twelve hours in all, and the desk asks who you are again. What is on the
          page stays.
        </p>
        <p className="note">
          Roles are given by the chair. Every sign-in and every change here is kept in the audit trail.
        </p>
      </aside>
    </>
  );
}
