// The pages that say who we are, what we keep, what we promise, and how to use the site.
import type { RouteObject } from 'react-router-dom';
import type { RouteContext } from '#src/lib/route-context.ts';
import { appealQuery } from './appeal-queries.ts';
import { PrivacyPage } from './PrivacyPage.tsx';
import { PromisePage } from './PromisePage.tsx';
import { UsingThisSitePage } from './UsingThisSitePage.tsx';

export function societyRoutes({ queryClient, api }: RouteContext): RouteObject[] {
  return [
    { id: 'privacy', path: 'privacy', handle: { title: 'Privacy' }, Component: PrivacyPage },
    {
      id: 'promise',
      path: 'promise',
      handle: { title: 'What we promise givers' },
      Component: PromisePage,
      loader: async () => {
        await queryClient.fetchQuery(appealQuery(api));
        return null;
      },
    },
    {
      id: 'using-this-site',
      path: 'using-this-site',
      handle: { title: 'Using this site' },
      Component: UsingThisSitePage,
    },
  ];
}
