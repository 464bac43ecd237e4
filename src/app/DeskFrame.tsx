// What stands around every room of the desk: the rail, who is here, the sheet and its margin.
import { Outlet, ScrollRestoration, useLoaderData } from 'react-router-dom';
import { personSchema } from '#shared/accounts/session-schemas.ts';
import { LeaveButton } from '#src/accounts/LeaveButton.tsx';
import { roleWords } from '#src/accounts/role-words.ts';
import { RunOutNotice } from '#src/accounts/RunOutNotice.tsx';
import { useArrivalFocus } from '#src/accounts/use-arrival-focus.ts';
import { useRunOut } from '#src/accounts/use-run-out.ts';
import { DeskRail } from './DeskRail.tsx';
import { usePageTurn } from './use-page-turn.ts';

export function DeskFrame() {
  const person = personSchema.parse(useLoaderData());
  const ranOut = useRunOut(person);
  usePageTurn('The desk');
  useArrivalFocus();
  return (
    <div className="desk">
      <a className="skip" href="#sheet">
        Go to the sheet
      </a>
      <div className="frame">
        <DeskRail roles={person.roles} />
        <section className="find" aria-label="Who is at the desk">
          <p className="who">
            {person.name}, {roleWords(person.roles)} · <LeaveButton>leave the desk</LeaveButton>
          </p>
        </section>
        <Outlet />
      </div>
      {ranOut !== null && <RunOutNotice step={ranOut} email={person.email} />}
      <ScrollRestoration />
    </div>
  );
}
