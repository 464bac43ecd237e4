// Puts the desk's rooms together, behind the door that is theirs. Loaded only when somebody comes to the desk.
import type { RouteObject } from 'react-router-dom';
import { accountRoutes, behindDoor, deskLoader, doorRoutes } from '#src/accounts/account-routes.tsx';
import { giftDeskRoutes } from '#src/giving/desk/gift-desk-routes.tsx';
import { nothingHere } from '#src/lib/page-fault.ts';
import type { RouteContext } from '#src/lib/route-context.ts';
import '#src/styles/desk.css';
import { todayRoutes } from '#src/today/today-routes.tsx';
import { DeskDoor } from './DeskDoor.tsx';
import { DeskFault } from './DeskFault.tsx';
import { DeskFrame } from './DeskFrame.tsx';
import { FaultPage } from './FaultPage.tsx';

export function deskRoutes(context: RouteContext): RouteObject[] {
  return [
    { id: 'desk-door', Component: DeskDoor, ErrorBoundary: FaultPage, children: doorRoutes(context) },
    {
      id: 'desk-frame',
      Component: DeskFrame,
      ErrorBoundary: FaultPage,
      loader: deskLoader(context),
      children: [
        {
          // A boundary of its own, so that the rail stays when a sheet fails.
          id: 'desk-sheets',
          ErrorBoundary: DeskFault,
          children: [
            ...behindDoor(context, [
              ...todayRoutes(context),
              ...giftDeskRoutes(context),
              ...accountRoutes(context),
            ]),
            {
              path: '/desk/*',
              loader: () => {
                throw nothingHere();
              },
              Component: DeskFault,
            },
          ],
        },
      ],
    },
  ];
}
