// What the desk asks of gifts, and what it decides about words and letters.
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  doneSchema,
  giftChainSchema,
  giftListSchema,
  type GiftFilter,
  type JudgeWords,
  type PaymentKind,
  type SettleMail,
  type SettlePayment,
} from '#shared/giving/desk-schemas.ts';
import type { Api } from '#src/lib/api.ts';
import { useApi } from '#src/lib/use-api.ts';
import { toSearch } from './gift-filter.ts';

const GIVING = ['giving', 'desk'] as const;

export const giftListQuery = (api: Api, filter: GiftFilter) =>
  queryOptions({
    queryKey: [...GIVING, 'gifts', filter],
    queryFn: ({ signal }) => api.get(giftListSchema, `/api/desk/gifts${toSearch(filter)}`, signal),
  });

export const giftChainQuery = (api: Api, number: string) =>
  queryOptions({
    queryKey: [...GIVING, 'gift', number],
    queryFn: ({ signal }) =>
      api.get(giftChainSchema, `/api/desk/gifts/${encodeURIComponent(number)}`, signal),
  });

/** A plain address, so that the browser itself keeps the file. */
export const giftsCsvPath = (filter: GiftFilter): string =>
  `/api/desk/gifts.csv${toSearch({ ...filter, after: '' })}`;

type Judgement = JudgeWords & { giftNumber: number; wordsId: string };

/** A page that outlives the row it was pressed in finds the verdict under this key. */
export const JUDGE_WORDS = [...GIVING, 'judge-words'] as const;

export function useJudgeWords() {
  const api = useApi();
  const queryClient = useQueryClient();
  return useMutation({
    mutationKey: JUDGE_WORDS,
    mutationFn: ({ giftNumber, wordsId, verdict }: Judgement) =>
      api.send(doneSchema, `/api/desk/gifts/${giftNumber}/words/${wordsId}`, { body: { verdict } }),
    // Asked anew after a refusal too: most likely somebody else was quicker, and the page should say so.
    onSettled: () => queryClient.invalidateQueries({ queryKey: GIVING }),
  });
}

export function useSettleLetter() {
  const api = useApi();
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: ({ mailId, decision }: SettleMail & { mailId: string }) =>
      api.send(doneSchema, `/api/desk/mail/${mailId}/settle`, { body: { decision } }),
    onSettled: () => queryClient.invalidateQueries({ queryKey: GIVING }),
  });
}

type PaymentLookedAt = SettlePayment & { paymentKind: PaymentKind; paymentId: string };

export function useSettlePayment() {
  const api = useApi();
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: ({ paymentKind, paymentId, reason }: PaymentLookedAt) =>
      api.send(doneSchema, `/api/desk/payments/${paymentKind}/${encodeURIComponent(paymentId)}/settle`, {
        body: { reason },
      }),
    onSettled: () => queryClient.invalidateQueries({ queryKey: GIVING }),
  });
}
