// The figure's page, and the address of each of her parts: the same page with that part's card open.
import type { RouteObject } from 'react-router-dom';
import { nothingHere } from '#src/lib/page-fault.ts';
import type { RouteContext } from '#src/lib/route-context.ts';
import type { RouteHandle } from '#src/lib/route-handle.ts';
import { campaignQuery } from './campaign-queries.ts';
import { HomePage } from './HomePage.tsx';
import { findPart } from './part-words.ts';

const handle: RouteHandle = { place: 'figure' };

export function homeRoutes({ queryClient, api }: RouteContext): RouteObject[] {
  const loadCampaign = () => queryClient.fetchQuery(campaignQuery(api));
  return [
    {
      id: 'home',
      Component: HomePage,
      loader: async () => ({ title: (await loadCampaign()).name }),
      children: [
        { id: 'figure', index: true, handle, Component: Nothing },
        {
          id: 'part',
          path: 'parts/:slug',
          handle,
          Component: Nothing,
          loader: async ({ params }) => {
            const campaign = await loadCampaign();
            const part = findPart(campaign, params.slug);
            if (!part) throw nothingHere();
            return { title: `${part.name}. ${campaign.name}` };
          },
        },
      ],
    },
  ];
}

/** The page draws the open card itself. */
function Nothing() {
  return null;
}
