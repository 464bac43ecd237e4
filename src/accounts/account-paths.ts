// The addresses of signing in and of one's own account.
export const accountPaths = {
  desk: '/desk',
  signIn: '/desk/sign-in',
  secondFactor: '/desk/second-factor',
  secondFactorSetup: '/desk/second-factor/set-up',
  account: '/desk/account',
} as const;

const DOORS: readonly string[] = [
  accountPaths.signIn,
  accountPaths.secondFactor,
  accountPaths.secondFactorSetup,
];
// The base is only there to read a path with; what leads away from it is another site.
const HERE = 'http://here.invalid';

/** Where to go after signing in: a page of the desk and nothing else, whatever the address bar says. */
export function ownPath(next: string | null): string {
  if (next === null || !next.startsWith('/') || !URL.canParse(next, HERE)) return accountPaths.desk;
  const { origin, pathname, search, hash } = new URL(next, HERE);
  const isDesk = pathname === accountPaths.desk || pathname.startsWith(`${accountPaths.desk}/`);
  if (origin !== HERE || !isDesk || DOORS.includes(pathname)) return accountPaths.desk;
  return `${pathname}${search}${hash}`;
}

export const withNext = (path: string, next: string): string =>
  next === accountPaths.desk ? path : `${path}?next=${encodeURIComponent(next)}`;
