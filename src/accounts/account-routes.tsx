// The pages of signing in, for the door, and of one's own account, for the frame.
import { redirect, type RouteObject } from 'react-router-dom';
import type { RouteContext } from '#src/lib/route-context.ts';
import { accountPaths, ownPath } from './account-paths.ts';
import { accountQuery, sessionQuery } from './accounts-queries.ts';
import { AccountPage } from './AccountPage.tsx';
import { doorOf } from './doors.ts';
import { SecondFactorPage } from './SecondFactorPage.tsx';
import { SecondFactorSetupPage } from './SecondFactorSetupPage.tsx';
import { SignInPage } from './SignInPage.tsx';

export const doorRoutes = ({ queryClient, api }: RouteContext): RouteObject[] => {
  // Asked before the page is drawn, so that no door flashes up before somebody who is already in.
  const loader = async () => {
    await queryClient.fetchQuery(sessionQuery(api));
    return null;
  };
  return [
    { path: accountPaths.signIn, handle: { title: 'Sign in' }, loader, Component: SignInPage },
    {
      path: accountPaths.secondFactor,
      handle: { title: 'One more proof' },
      loader,
      Component: SecondFactorPage,
    },
    {
      path: accountPaths.secondFactorSetup,
      handle: { title: 'Second factor' },
      loader,
      Component: SecondFactorSetupPage,
    },
  ];
};

export const accountRoutes = ({ queryClient, api }: RouteContext): RouteObject[] => [
  {
    path: accountPaths.account,
    handle: { title: 'My account' },
    loader: () => {
      void queryClient.prefetchQuery(accountQuery(api));
      return null;
    },
    Component: AccountPage,
  },
];

/** Lets in whoever has proven everything; sends others to the door that is theirs, and back afterwards. */
export const deskLoader =
  ({ queryClient, api }: RouteContext) =>
  async ({ request }: { request: Request }) => {
    const session = await queryClient.fetchQuery(sessionQuery(api));
    const { pathname, search } = new URL(request.url);
    const door = doorOf(session.step, ownPath(`${pathname}${search}`));
    if (door !== null) throw redirect(door);
    return session.person;
  };

/** The rooms' own loaders run beside the door's: for a stranger they ask nothing, since it would be refused. */
export const behindDoor = ({ queryClient, api }: RouteContext, rooms: RouteObject[]): RouteObject[] =>
  rooms.map((room) => {
    const { loader } = room;
    if (typeof loader !== 'function') return room;
    const guarded: typeof loader = async (args, context) => {
      const { step } = await queryClient.fetchQuery(sessionQuery(api));
      return step === 'signed-in' ? loader(args, context) : null;
    };
    return { ...room, loader: guarded };
  });
