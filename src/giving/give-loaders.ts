// What each giving page needs before it is drawn, with its title.
import { inSentence } from '#shared/campaign/name-rules.ts';
import { redirect } from 'react-router-dom';
import { formatPence } from '#shared/money.ts';
import { fieldFaults, type FieldFaults } from '#shared/errors.ts';
import { giveRequestSchema, type GiveOutcome, type GiveSheet } from '#shared/giving/give-schemas.ts';
import type { RouteContext } from '#src/lib/route-context.ts';
import { nothingHere } from '#src/lib/page-fault.ts';
import { faultsHeading } from '#src/ui/ErrorSummary.tsx';
import { backToSheet, payTroubleOf, takeTroubleTitle } from './give-actions.ts';
import { giveCheckQuery, giveOutcomeQuery, giveSheetQuery, receiptQuery } from './give-queries.ts';
import { atStart } from './give-words.ts';

/** The faults of a draft as it was kept, by the rules that also judge the press. */
function faultsOf(sheet: GiveSheet): FieldFaults {
  const { answers, openParts, leastPence } = sheet;
  const judged = giveRequestSchema({ leastPence }).safeParse(answers);
  const faults = judged.success ? {} : fieldFaults(judged.error);
  const { towards = 'whole' } = answers;
  if (towards !== 'whole' && !openParts.some((part) => part.slug === towards))
    faults.towards = 'The part you chose is paid for now. Choose another part, or the whole figure.';
  return faults;
}

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
  const heading = takeTroubleTitle(context.queryClient);
  return heading === undefined ? title : `${heading} ${title}`;
};

export async function loadSheet(context: RouteContext, request: Request) {
  const { searchParams } = new URL(request.url);
  const query = giveSheetQuery(context.api, askedFor(searchParams));
  const sheet = await context.queryClient.fetchQuery(query);
  const faults = searchParams.has('unfinished') ? faultsOf(sheet) : {};
  const count = Object.keys(faults).length;
  const title = `Give to ${inSentence(sheet.campaignName)}`;
  return {
    title: titled(context, count > 0 ? `${faultsHeading(count)}. ${title}` : title),
    sheet,
    faults,
    isLostSheet: searchParams.has('again'),
  };
}
export type GivePageData = Awaited<ReturnType<typeof loadSheet>>;

export async function loadCheck(context: RouteContext, request: Request) {
  try {
    const check = await context.queryClient.fetchQuery(giveCheckQuery(context.api));
    const { searchParams } = new URL(request.url);
    const trouble = payTroubleOf(searchParams);
    const title = `Check before you pay. ${atStart(check.campaignName)}`;
    return {
      title: trouble ? `${trouble.heading} ${title}` : title,
      check,
      trouble,
      isReturned: searchParams.has('returned'),
    };
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
