// The rooms of the desk, grouped by who works there. A room is named here once it exists.
import type { Role } from '#shared/roles.ts';
import { accountPaths } from '#src/accounts/account-paths.ts';
import { paths } from './paths.ts';

export type DeskRoom = { name: string; path: string; isExact?: boolean; roles?: readonly Role[] };

export const TODAY_ROOM: DeskRoom = { name: 'Today', path: paths.desk, isExact: true };

const GROUPS: readonly { name: string; rooms: readonly DeskRoom[] }[] = [
  {
    name: 'Money',
    rooms: [{ name: 'Gifts', path: '/desk/gifts', roles: ['chair', 'treasurer', 'secretary', 'examiner'] }],
  },
  { name: 'Account', rooms: [{ name: 'My account', path: accountPaths.account }] },
];

const opensTo = (room: DeskRoom, held: readonly Role[]): boolean =>
  room.roles === undefined || room.roles.some((role) => held.includes(role));

/** What a person's roles open; a group without rooms is not named. */
export const roomsFor = (held: readonly Role[]) =>
  GROUPS.map(({ name, rooms }) => ({ name, rooms: rooms.filter((room) => opensTo(room, held)) })).filter(
    ({ rooms }) => rooms.length > 0,
  );
