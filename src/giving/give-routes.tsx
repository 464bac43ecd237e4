// The public giving pages: the sheet, the check before paying, how it ended, and the receipt.
import type { RouteObject } from 'react-router-dom';
import type { RouteContext } from '#src/lib/route-context.ts';
import { CheckPage } from './CheckPage.tsx';
import { DonePage } from './DonePage.tsx';
import { pressCheck, pressPay } from './give-actions.ts';
import { loadCheck, loadDone, loadReceipt, loadSheet } from './give-loaders.ts';
import { GivePage } from './GivePage.tsx';
import { ReceiptPage } from './ReceiptPage.tsx';

export function giveRoutes(context: RouteContext): RouteObject[] {
  return [
    {
      id: 'give',
      path: '/give',
      loader: ({ request }) => loadSheet(context, request),
      action: ({ request }) => pressCheck(context, request),
      Component: GivePage,
    },
    {
      id: 'give-check',
      path: '/give/check',
      loader: ({ request }) => loadCheck(context, request),
      action: ({ request }) => pressPay(context, request),
      Component: CheckPage,
    },
    {
      id: 'give-done',
      path: '/give/done',
      loader: ({ request }) => loadDone(context, request),
      Component: DonePage,
    },
    {
      id: 'receipt',
      path: '/receipts/:token',
      loader: ({ params }) => loadReceipt(context, params.token),
      Component: ReceiptPage,
    },
  ];
}
