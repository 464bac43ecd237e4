// The desk's first page.
import type { RouteObject } from 'react-router-dom';
import type { RouteContext } from '#src/lib/route-context.ts';
import '#src/styles/desk-rooms.css';
import { todayQuery } from './today-queries.ts';
import { TodayPage } from './TodayPage.tsx';

export const todayRoutes = ({ queryClient, api }: RouteContext): RouteObject[] => [
  {
    id: 'desk-today',
    path: '/desk',
    handle: { title: 'Today' },
    loader: () => {
      void queryClient.prefetchQuery(todayQuery(api));
      return null;
    },
    Component: TodayPage,
  },
];
