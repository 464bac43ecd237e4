// What other rooms may use of giving.
export { createGiftsRouter, createReceiptFilesRouter, createReceiptsRouter } from './giving-routes.ts';
export { createGivingDeskRouter } from './giving-desk-routes.ts';
export { createWebhookRouter } from './webhook-routes.ts';
export { givingTasks } from './giving-jobs.ts';
export { readStanding, type Standing } from './standing.ts';
export { listGiftHistory } from './gift-history-reads.ts';
export {
  listHangingPayments,
  listLetterSubjects,
  listUnreadWords,
  type HangingEvent,
  type HangingIntent,
  type LetterSubject,
  type UnreadWords,
} from './owed-reads.ts';
export { GIFT_ROLES, mayAct, type Reader } from './withheld-names.ts';
export { beginCheckout } from './checkout-service.ts';
export { writeDraft } from './draft-service.ts';
export { makeToken } from './draft-store.ts';
export { readOutcome } from './giving-reads.ts';
export { judgeWords } from './words-service.ts';
