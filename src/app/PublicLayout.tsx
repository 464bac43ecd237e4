// The printed masthead above and the colophon below every public page.
import { useQuery } from '@tanstack/react-query';
import { Link, NavLink, Outlet, ScrollRestoration, useLocation } from 'react-router-dom';
import type { Society } from '#shared/society/society-schemas.ts';
import { useApi } from '#src/lib/use-api.ts';
import { societyQuery } from '#src/society/society-queries.ts';
import { paths } from './paths.ts';
import { usePageTurn } from './use-page-turn.ts';

const PEG = 'M7 .5a6.5 6.5 0 1 0 0 13a6.5 6.5 0 1 0 0-13ZM7 3.2a3.8 3.8 0 1 1 0 7.6a3.8 3.8 0 1 1 0-7.6Z';

function Masthead({ name }: { name: string }) {
  const { pathname } = useLocation();
  const isFigure = pathname === paths.home || pathname.startsWith('/parts/');
  return (
    <header className="masthead">
      <Link className="house" to={paths.home}>
        <svg viewBox="0 0 14 14" aria-hidden="true">
          <path d={PEG} fill="currentColor" fillRule="evenodd" />
        </svg>
        {name}
      </Link>
      <nav aria-label="Site">
        <ul>
          <li>
            <Link to={paths.home} aria-current={isFigure ? 'page' : undefined}>
              The figure
            </Link>
          </li>
          <li>
            <NavLink to={paths.give}>Give</NavLink>
          </li>
        </ul>
      </nav>
    </header>
  );
}

function Colophon({ society }: { society: Society }) {
  return (
    <footer className="colophon">
      <p>
        {society.name}, {society.addressLine}
        <br />
        {society.registrationStatement} <span className="nowrap">{society.phone}</span>.{' '}
        <a href={`mailto:${society.email}`}>{society.email}</a>
      </p>
      <ul aria-label="About this site">
        <li>
          <Link to={paths.privacy}>Privacy</Link>
        </li>
        <li>
          <Link to={paths.promise}>What we promise givers</Link>
        </li>
        <li>
          <Link to={paths.usingThisSite}>Using this site</Link>
        </li>
        <li>
          {/* The desk is a page of its own that is never kept: it is fetched anew. */}
          <a href={paths.desk}>The desk</a>
        </li>
      </ul>
    </footer>
  );
}

export function PublicLayout() {
  const { data: society } = useQuery(societyQuery(useApi()));
  usePageTurn(society?.name ?? 'Treenail');
  return (
    <>
      <a className="skip" href="#main">
        Skip to the page
      </a>
      <Masthead name={society?.name ?? 'Treenail'} />
      <Outlet />
      {society && <Colophon society={society} />}
      <ScrollRestoration />
    </>
  );
}
