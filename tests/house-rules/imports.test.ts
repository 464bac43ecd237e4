// Who may import whom: down the list of rooms only, through a room's own door, never between browser and server.
import path from 'node:path';
import { describe, expect, test } from 'vitest';
import { importsOf, listFiles, type SourceFile } from './source-files.ts';

/** The floor on which each room stands; imports go down, never up or sideways. */
const FLOORS: Record<string, number> = {
  platform: 0,
  ui: 0,
  lib: 0,
  accounts: 1,
  society: 1,
  campaign: 2,
  supporters: 2,
  schools: 2,
  books: 2,
  declarations: 3,
  diary: 3,
  designs: 3,
  'work-days': 3,
  giving: 4,
  promises: 5,
  claims: 5,
  grants: 5,
  bank: 6,
  letters: 6,
  'stage-funding': 6,
  reports: 7,
  privacy: 8,
  home: 9,
  today: 9,
  search: 9,
};

type Place = { side: string; room: string | null; file: string };

function placeOf(file: string): Place {
  const [side = '', second, ...rest] = file.split('/');
  return {
    side,
    room: rest.length > 0 || (second !== undefined && !second.includes('.')) ? (second ?? null) : null,
    file,
  };
}

/** The file an import leads to, from the top of the project; null for packages. */
function target(from: SourceFile, specifier: string): string | null {
  if (specifier.startsWith('#')) return specifier.slice(1);
  if (specifier.startsWith('.'))
    return path.posix
      .normalize(path.posix.join(path.posix.dirname(from.path), specifier))
      .replace(/\?.*$/, '');
  return null;
}

const edges = listFiles(/^(server|src|shared)\/.*\.(ts|tsx)$/).flatMap((file) =>
  importsOf(file).flatMap((specifier) => {
    const to = target(file, specifier);
    return to === null ? [] : [{ file, from: placeOf(file.path), to: placeOf(to), specifier }];
  }),
);
const told = (found: typeof edges) => found.map((edge) => `${edge.file.path} → ${edge.to.file}`);
const floor = (room: string | null): number =>
  room === null ? Number.POSITIVE_INFINITY : (FLOORS[room] ?? Number.NaN);

describe('imports', () => {
  test('are found at all', () => expect(edges.length).toBeGreaterThan(300));

  test('every room has its floor', () => {
    const rooms = new Set(
      edges.filter((edge) => edge.from.side !== 'shared').flatMap((edge) => [edge.from.room, edge.to.room]),
    );
    const unknown = [...rooms].filter(
      (room) => room !== null && !(room in FLOORS) && !['app', 'styles'].includes(room),
    );
    expect(unknown).toEqual([]);
  });

  test('shared imports neither browser nor server, and those two never one another', () => {
    const wrong = edges.filter(
      ({ from, to }) =>
        (from.side === 'shared' && to.side !== 'shared') ||
        (from.side === 'src' && to.side === 'server') ||
        (from.side === 'server' && to.side === 'src'),
    );
    expect(told(wrong)).toEqual([]);
  });

  test('on the server go down, and into another room by its door only', () => {
    const between = edges.filter(
      ({ from, to }) =>
        from.side === 'server' && to.side === 'server' && from.room !== to.room && from.room !== null,
    );
    const wrong = between.filter(({ from, to }) => {
      if (to.room === null) return to.file !== 'server/deps.ts';
      if (to.room === 'platform') return false;
      return !(floor(to.room) < floor(from.room)) || !to.file.endsWith('/index.ts');
    });
    expect(told(wrong)).toEqual([]);
  });

  test('the processes and the table of contents use rooms by their door', () => {
    const wrong = edges.filter(
      ({ from, to }) =>
        from.side === 'server' &&
        from.room === null &&
        to.side === 'server' &&
        to.room !== null &&
        to.room !== 'platform' &&
        !to.file.endsWith('/index.ts'),
    );
    expect(told(wrong)).toEqual([]);
  });

  test('the platform knows no room', () => {
    const wrong = edges.filter(
      ({ from, to }) =>
        from.side === 'server' &&
        from.room === 'platform' &&
        to.side === 'server' &&
        to.room !== 'platform' &&
        to.file !== 'server/deps.ts',
    );
    expect(told(wrong)).toEqual([]);
  });

  test('in the browser a room uses a lower room’s queries only; src/app alone puts rooms together', () => {
    const wrong = edges.filter(({ from, to }) => {
      if (from.side !== 'src' || to.side !== 'src' || from.room === to.room) return false;
      if (from.room === 'app' || from.room === null) return false;
      if (['ui', 'lib', 'styles'].includes(to.room ?? '')) return false;
      if (to.room === 'app') return to.file !== 'src/app/paths.ts';
      return !(floor(to.room) < floor(from.room)) || !/-queries\.tsx?$/.test(to.file);
    });
    expect(told(wrong)).toEqual([]);
  });

  // Today is the desk's own first page; src/app puts public pages and the desk together.
  test('public pages never import the desk', () => {
    const wrong = edges.filter(
      ({ from, to, file }) =>
        from.side === 'src' &&
        /\/desk\//.test(to.file) &&
        !/\/desk\//.test(file.path) &&
        !['app', 'today'].includes(from.room ?? ''),
    );
    expect(told(wrong)).toEqual([]);
  });
});
