// Starts the site in the browser: takes over the page that the server drew, or draws the desk.
import './index.css';
import { createRoot, hydrateRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { openBrowserRouter } from './app/browser-router.tsx';
import { Site } from './app/Site.tsx';
import { createBrowserApi } from './lib/browser-api.ts';
import { readPageState, type PageState } from './lib/page-state.ts';
import { createQueryClient } from './lib/query-client.ts';

/**
 * A kept page may have been drawn days ago by another clock, yet it is true now: it is thrown away as soon as
 * its data changes. So its answers are as fresh as the page.
 */
function freshen(state: PageState): PageState {
  const now = Date.now();
  for (const query of state.query.queries) query.state.dataUpdatedAt = now;
  return state;
}

const read = readPageState(document.getElementById('state')?.textContent);
const state = read && freshen(read);
const queryClient = createQueryClient({ mayRetry: true });
const api = createBrowserApi(queryClient);
const router = await openBrowserRouter({ queryClient, api }, state?.router);
const site = (
  <Site queryClient={queryClient} api={api} query={state?.query}>
    <RouterProvider router={router} />
  </Site>
);
const root = document.getElementById('root');
if (root && state) hydrateRoot(root, site);
else if (root) createRoot(root).render(site);
