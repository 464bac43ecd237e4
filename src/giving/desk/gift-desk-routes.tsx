// The desk's pages about gifts. They ask at once and show what they have; nothing waits for the slowest answer.
import type { RouteObject } from 'react-router-dom';
import type { RouteContext } from '#src/lib/route-context.ts';
import '#src/styles/desk-rooms.css';
import { giftChainQuery, giftListQuery } from './gift-desk-queries.ts';
import { readFilter } from './gift-filter.ts';
import { GiftPage } from './GiftPage.tsx';
import { GiftsPage } from './GiftsPage.tsx';

export const giftDeskRoutes = ({ queryClient, api }: RouteContext): RouteObject[] => [
  {
    id: 'desk-gifts',
    path: '/desk/gifts',
    handle: { title: 'Gifts' },
    loader: ({ request }) => {
      const { filter } = readFilter(new URL(request.url).searchParams);
      void queryClient.prefetchQuery(giftListQuery(api, filter));
      return null;
    },
    Component: GiftsPage,
  },
  {
    id: 'desk-gift',
    path: '/desk/gifts/:number',
    loader: ({ params }) => {
      const number = params.number ?? '';
      void queryClient.prefetchQuery(giftChainQuery(api, number));
      return { title: `Gift ${number}` };
    },
    Component: GiftPage,
  },
];
