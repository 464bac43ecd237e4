// What the giving pages ask the API for and send to it, each answer parsed.
import { queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import {
  checkoutSchema,
  giveCheckSchema,
  giveOutcomeSchema,
  giveSheetSchema,
  receiptSchema,
  type GiveAnswers,
} from '#shared/giving/give-schemas.ts';
import type { Api } from '#src/lib/api.ts';

const DRAFT_PATH = '/api/gifts/draft';
/** Drafts change with every press: an earlier answer is never good enough, nor worth keeping. */
const AFRESH = { staleTime: 0, gcTime: 0 } as const;

export const giveSheetQuery = (api: Api, search: string) =>
  queryOptions({
    queryKey: ['giving', 'sheet', search],
    queryFn: ({ signal }) => api.get(giveSheetSchema, `/api/gifts/sheet${search}`, signal),
    ...AFRESH,
  });

export const giveCheckQuery = (api: Api) =>
  queryOptions({
    queryKey: ['giving', 'check'],
    queryFn: ({ signal }) => api.get(giveCheckSchema, '/api/gifts/check', signal),
    ...AFRESH,
  });

export const outcomePath = (intentId: string) => `/api/gifts/${encodeURIComponent(intentId)}/outcome`;
export const giveOutcomeQuery = (api: Api, intentId: string) =>
  queryOptions({
    queryKey: ['giving', 'outcome', intentId],
    queryFn: ({ signal }) => api.get(giveOutcomeSchema, outcomePath(intentId), signal),
    staleTime: 0,
  });

export const receiptQuery = (api: Api, token: string) =>
  queryOptions({
    queryKey: ['giving', 'receipt', token],
    queryFn: ({ signal }) => api.get(receiptSchema, `/api/receipts/${encodeURIComponent(token)}`, signal),
    ...AFRESH,
  });

/** The last quiet keeping still on its way. */
let quietSending: Promise<unknown> = Promise.resolve();

export async function saveDraft(api: Api, answers: GiveAnswers): Promise<void> {
  // Were an earlier keeping to arrive after this one, it would put older answers in place of these.
  await quietSending;
  await api.send(z.object({}), DRAFT_PATH, { method: 'PUT', body: answers });
}

export const startCheckout = (api: Api, appealVersion: number) =>
  api.send(checkoutSchema, '/api/gifts/checkout', { method: 'POST', body: { appealVersion } });

/** Keeps what was typed while the page is being left; nobody waits for the answer, right or wrong. */
export function keepDraftQuietly(answers: GiveAnswers): void {
  const sending = fetch(`${DRAFT_PATH}?quiet=1`, {
    method: 'PUT',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(answers),
    keepalive: true,
  });
  // Without a connection the sheet is still in the open page, and it is sent again at the next step away.
  quietSending = sending.catch(() => undefined);
}
