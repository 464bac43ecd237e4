// What each giving page needs before it is drawn, with its title.
import { redirect } from 'react-router-dom';
import { formatPence } from '#shared/money.ts';
import type { GiveOutcome } from '#shared/giving/give-schemas.ts';
import type { RouteContext } from '#src/lib/route-context.ts';
import { nothingHere } from '#src/lib/page-fault.ts';
import { backToSheet, takeTroubleTitle } from './give-actions.ts';
import { giveCheckQuery, giveOutcomeQuery, giveSheetQuery, receiptQuery } from './give-queries.ts';
import { atStart, inSentence } from './give-words.ts';

/** A sum written on the way here was written instead of choosing one. */
function askedFor(search: URLSearchParams): string {
  const asked = new URLSearchParams();
  for (const name of ['towards', 'amount', 'other']) {
    const value = search.get(name)?.trim();
    if (value) asked.set(name, value);
  }
  if (asked.has('other')) asked.set('amount', 'other');
  return asked.size > 0 ? `?${asked.toString()}` : '';
}

const titled = (context: RouteContext, title: string): string => {
  const trouble = takeTroubleTitle(context.queryClient);
  return trouble === undefined ? title : `${trouble}. ${title}`;
};

export async function loadSheet(context: RouteContext, request: Request) {
  const { searchParams } = new URL(request.url);
  const query = giveSheetQuery(context.api, askedFor(searchParams));
  const sheet = await context.queryClient.fetchQuery(query);
  const notice = searchParams.has('again')
    ? ('again' as const)
    : searchParams.has('unfinished')
      ? ('unfinished' as const)
      : null;
  return { title: titled(context, `Give to ${inSentence(sheet.campaignName)}`), sheet, notice };
}
export type GivePageData = Awaited<ReturnType<typeof loadSheet>>;

export async function loadCheck(context: RouteContext, request: Request) {
  try {
    const check = await context.queryClient.fetchQuery(giveCheckQuery(context.api));
    const isReturned = new URL(request.url).searchParams.has('returned');
    const title = `Check before you pay. ${atStart(check.campaignName)}`;
    return { title: titled(context, title), check, isReturned };
  } catch (error) {
    const sheet = backToSheet(error);
    if (sheet !== undefined) throw redirect(sheet);
    throw error;
  }
}
/** A loader that sends the reader on gives no page. */
export type CheckPageData = Exclude<Awaited<ReturnType<typeof loadCheck>>, Response>;

export const OUTCOME_TITLES: Record<GiveOutcome['outcome'], string> = {
  paid: 'Thank you',
  confirming: 'Your gift is being confirmed',
  'not-paid': 'Your gift was not paid',
};

export async function loadDone({ api, queryClient }: RouteContext, request: Request) {
  const intentId = new URL(request.url).searchParams.get('gift');
  if (!intentId) throw nothingHere();
  const outcome = await queryClient.fetchQuery(giveOutcomeQuery(api, intentId));
  return { title: OUTCOME_TITLES[outcome.outcome], intentId, outcome };
}
export type DonePageData = Awaited<ReturnType<typeof loadDone>>;

export async function loadReceipt({ api, queryClient }: RouteContext, token: string | undefined) {
  if (!token) throw nothingHere();
  const receipt = await queryClient.fetchQuery(receiptQuery(api, token));
  return { title: `Receipt ${receipt.number} for ${formatPence(receipt.sumPence)}`, token, receipt };
}
export type ReceiptPageData = Awaited<ReturnType<typeof loadReceipt>>;
