// The rail: the mark, and the rooms by group; a peg holds the current one to the sheet.
import { useQuery } from '@tanstack/react-query';
import { Link, NavLink } from 'react-router-dom';
import type { Role } from '#shared/roles.ts';
import { useApi } from '#src/lib/use-api.ts';
import { todayQuery } from '#src/today/today-queries.ts';
import { roomsFor, TODAY_ROOM, type DeskRoom } from './desk-rooms.ts';
import { paths } from './paths.ts';
import { PegMark } from './PegMark.tsx';

function Room({ room, waiting = 0 }: { room: DeskRoom; waiting?: number }) {
  return (
    <li>
      <NavLink to={room.path} end={room.isExact ?? false}>
        {room.name}
        {waiting > 0 && (
          <i>
            <span className="vh">waiting: </span>
            {waiting}
          </i>
        )}
      </NavLink>
    </li>
  );
}

export function DeskRail({ roles }: { roles: readonly Role[] }) {
  const owed = useQuery({ ...todayQuery(useApi()), select: ({ rows }) => rows.length }).data;
  return (
    <header className="rail">
      <Link className="mark" to={paths.desk}>
        <PegMark />
        <b>Treenail</b>
        <span>The desk</span>
      </Link>
      <nav className="rooms" aria-label="Rooms">
        <ul>
          <Room room={TODAY_ROOM} waiting={owed ?? 0} />
        </ul>
        {roomsFor(roles).map(({ name, rooms }) => (
          <section key={name} aria-labelledby={`rooms-${name}`}>
            <h2 id={`rooms-${name}`}>{name}</h2>
            <ul>
              {rooms.map((room) => (
                <Room key={room.path} room={room} />
              ))}
            </ul>
          </section>
        ))}
      </nav>
    </header>
  );
}
