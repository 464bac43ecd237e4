// Puts the public rooms together: which page stands at which address. A room may also come later, by PAGES.
import type { RouteObject } from 'react-router-dom';
import { homeRoutes } from '#src/home/home-routes.tsx';
import { nothingHere } from '#src/lib/page-fault.ts';
import type { RouteContext } from '#src/lib/route-context.ts';
import { societyQuery } from '#src/society/society-queries.ts';
import { societyRoutes } from '#src/society/society-routes.tsx';
import { FaultPage } from './FaultPage.tsx';
import { PublicLayout } from './PublicLayout.tsx';

const loadNothing = () => {
  throw nothingHere();
};

/** The route below which public rooms stand. */
export const PAGES = 'pages';

/** @param rooms the routes of rooms that are not needed everywhere and are loaded apart in the browser */
export function createRoutes(context: RouteContext, rooms: readonly RouteObject[]): RouteObject[] {
  const { queryClient, api } = context;
  return [
    {
      id: 'site',
      Component: PublicLayout,
      ErrorBoundary: FaultPage,
      loader: async () => {
        await queryClient.fetchQuery(societyQuery(api));
        return null;
      },
      children: [
        {
          // A boundary of its own, so that masthead and colophon stay when a page fails.
          id: PAGES,
          ErrorBoundary: FaultPage,
          children: [
            ...homeRoutes(context),
            ...societyRoutes(context),
            ...rooms,
            { id: 'nothing', path: '*', loader: loadNothing, Component: FaultPage },
          ],
        },
      ],
    },
  ];
}
