// Every endpoint of the API in one list: where it stands, what it takes and what it answers.
import { z } from 'zod';
import {
  accountSchema,
  changePasswordSchema,
  beginSecondFactorSchema,
  oneTimeCodeSchema,
  secondFactorSchema,
  recoveryCodesSchema,
  secondFactorKeptSchema,
  secondFactorOfferSchema,
  sessionSchema,
  signInSchema,
} from '#shared/accounts/session-schemas.ts';
import { campaignSchema } from '#shared/campaign/campaign-schemas.ts';
import { problemSchema } from '#shared/errors.ts';
import {
  doneSchema,
  giftChainSchema,
  giftFilterSchema,
  giftListSchema,
  judgeWordsSchema,
  PAYMENT_KINDS,
  settleMailSchema,
  settlePaymentSchema,
} from '#shared/giving/desk-schemas.ts';
import {
  checkoutRequestSchema,
  checkoutSchema,
  giveCheckSchema,
  giveFormSchema,
  giveOutcomeSchema,
  giveSheetSchema,
  receiptSchema,
} from '#shared/giving/give-schemas.ts';
import { societySchema } from '#shared/society/society-schemas.ts';
import { todaySchema } from '#shared/today/today-schemas.ts';
import { describeApi, type Described } from '#server/platform/openapi.ts';

const nothing = z.strictObject({});
const PUBLIC: readonly Described[] = [
  {
    method: 'get',
    path: '/api/campaign',
    operationId: 'getCampaign',
    tag: 'campaign',
    answer: campaignSchema,
    summary: 'The figure, its money and its stages.',
  },
  { method: 'get', path: '/api/society', operationId: 'getSociety', tag: 'society', answer: societySchema },
  {
    method: 'get',
    path: '/api/gifts/sheet',
    operationId: 'getGiveSheet',
    tag: 'giving',
    answer: giveSheetSchema,
    query: z.object({
      towards: z.string().optional(),
      amount: z.string().optional(),
      other: z.string().optional(),
    }),
  },
  {
    method: 'put',
    path: '/api/gifts/draft',
    operationId: 'keepDraft',
    tag: 'giving',
    body: giveFormSchema,
    answer: nothing,
    query: z.object({ quiet: z.literal('1').optional() }),
    summary: 'Keeps what was typed, then says what needs putting right.',
  },
  {
    method: 'get',
    path: '/api/gifts/check',
    operationId: 'getGiveCheck',
    tag: 'giving',
    answer: giveCheckSchema,
  },
  {
    method: 'post',
    path: '/api/gifts/checkout',
    operationId: 'beginCheckout',
    tag: 'giving',
    body: checkoutRequestSchema,
    answer: checkoutSchema,
  },
  {
    method: 'get',
    path: '/api/gifts/{intentId}/outcome',
    operationId: 'getOutcome',
    tag: 'giving',
    answer: giveOutcomeSchema,
    params: z.object({ intentId: z.uuid() }),
  },
  {
    method: 'get',
    path: '/api/receipts/{token}',
    operationId: 'getReceipt',
    tag: 'giving',
    answer: receiptSchema,
    params: z.object({ token: z.string() }),
  },
];

const SESSION: readonly Described[] = [
  {
    method: 'get',
    path: '/api/session',
    operationId: 'getSession',
    tag: 'accounts',
    answer: sessionSchema,
    summary: 'Who am I.',
  },
  {
    method: 'post',
    path: '/api/session',
    operationId: 'signIn',
    tag: 'accounts',
    body: signInSchema,
    answer: sessionSchema,
  },
  { method: 'delete', path: '/api/session', operationId: 'signOut', tag: 'accounts', answer: sessionSchema },
  {
    method: 'post',
    path: '/api/session/second-factor',
    operationId: 'giveSecondFactor',
    tag: 'accounts',
    body: secondFactorSchema,
    answer: sessionSchema,
  },
  {
    method: 'post',
    path: '/api/session/second-factor/setup',
    operationId: 'offerSecondFactor',
    tag: 'accounts',
    body: beginSecondFactorSchema,
    answer: secondFactorOfferSchema,
  },
  {
    method: 'post',
    path: '/api/session/second-factor/setup/confirm',
    operationId: 'confirmSecondFactor',
    tag: 'accounts',
    body: oneTimeCodeSchema,
    answer: secondFactorKeptSchema,
  },
];

const DESK: readonly Described[] = [
  {
    method: 'get',
    path: '/api/desk/account',
    operationId: 'getAccount',
    tag: 'accounts',
    answer: accountSchema,
  },
  {
    method: 'post',
    path: '/api/desk/account/password',
    operationId: 'changePassword',
    tag: 'accounts',
    body: changePasswordSchema,
    answer: sessionSchema,
  },
  {
    method: 'post',
    path: '/api/desk/account/recovery-codes',
    operationId: 'renewRecoveryCodes',
    tag: 'accounts',
    body: oneTimeCodeSchema,
    answer: recoveryCodesSchema,
  },
  { method: 'get', path: '/api/desk/today', operationId: 'getToday', tag: 'today', answer: todaySchema },
  {
    method: 'get',
    path: '/api/desk/gifts',
    operationId: 'listGifts',
    tag: 'giving',
    query: giftFilterSchema,
    answer: giftListSchema,
  },
  {
    method: 'get',
    path: '/api/desk/gifts.csv',
    operationId: 'exportGifts',
    tag: 'giving',
    query: giftFilterSchema,
    answer: z.string(),
    answerType: 'text/csv',
  },
  {
    method: 'get',
    path: '/api/desk/gifts/{number}',
    operationId: 'getGift',
    tag: 'giving',
    params: z.object({ number: z.string() }),
    answer: giftChainSchema,
  },
  {
    method: 'post',
    path: '/api/desk/gifts/{number}/words/{id}',
    operationId: 'judgeWords',
    tag: 'giving',
    params: z.object({ number: z.string(), id: z.uuid() }),
    body: judgeWordsSchema,
    answer: doneSchema,
  },
  {
    method: 'post',
    path: '/api/desk/mail/{id}/settle',
    operationId: 'settleMail',
    tag: 'giving',
    params: z.object({ id: z.uuid() }),
    body: settleMailSchema,
    answer: doneSchema,
  },
  {
    method: 'post',
    path: '/api/desk/payments/{kind}/{id}/settle',
    operationId: 'settlePayment',
    tag: 'giving',
    params: z.object({ kind: z.enum(PAYMENT_KINDS), id: z.string() }),
    body: settlePaymentSchema,
    answer: doneSchema,
    summary: 'The treasurer says how a payment that does not agree, or a refused event, was put right.',
  },
];

export const ENDPOINTS: readonly Described[] = [
  ...PUBLIC,
  ...SESSION,
  ...DESK.map((one) => ({ ...one, isStaff: true })),
];

export const apiDocument = () => describeApi(ENDPOINTS, problemSchema);
