// The router of the browser: what the page at hand needs is loaded at once, the rest when a reader goes there.
import { createBrowserRouter, type HydrationState, type RouteObject } from 'react-router-dom';
import type { RouteContext } from '#src/lib/route-context.ts';
import { isDeskPath, isGivePath } from './paths.ts';
import { createRoutes, PAGES } from './router.tsx';

const loadGiving = async (context: RouteContext): Promise<RouteObject[]> => {
  const { giveRoutes } = await import('#src/giving/give-routes.tsx');
  return giveRoutes(context);
};

const loadDesk = async (context: RouteContext): Promise<RouteObject[]> => {
  const { deskRoutes } = await import('./desk-routes.tsx');
  return [{ id: 'desk', HydrateFallback: () => null, children: deskRoutes(context) }];
};

export async function openBrowserRouter(context: RouteContext, hydrationData: HydrationState | undefined) {
  const { pathname } = location;
  const giving = isGivePath(pathname) ? await loadGiving(context) : [];
  const desk = isDeskPath(pathname) ? await loadDesk(context) : [];
  let isGivingHere = giving.length > 0;
  return createBrowserRouter([...desk, ...createRoutes(context, giving)], {
    ...(hydrationData && { hydrationData }),
    async patchRoutesOnNavigation({ path, patch }) {
      if (isGivingHere || !isGivePath(path)) return;
      const routes = await loadGiving(context);
      isGivingHere = true;
      patch(PAGES, routes);
    },
  });
}
