// What stands around the pages before the desk: the mark, one narrow sheet, and the way back to the figure.
import { Link, Outlet } from 'react-router-dom';
import { accountPaths } from '#src/accounts/account-paths.ts';
import { paths } from './paths.ts';
import { PegMark } from './PegMark.tsx';
import { usePageTurn } from './use-page-turn.ts';

export function DeskDoor() {
  usePageTurn('The desk');
  return (
    <div className="desk door">
      <a className="skip" href="#sheet">
        Go to the sheet
      </a>
      <header className="rail">
        <Link className="mark" to={accountPaths.signIn}>
          <PegMark />
          <b>Treenail</b>
          <span>The desk</span>
        </Link>
      </header>
      <Outlet />
      <footer className="door-foot">
        {/* The public pages are drawn by the server: they are fetched anew. */}
        <a href={paths.home}>To the figure</a>
      </footer>
    </div>
  );
}
