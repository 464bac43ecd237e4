// What the worker does for giving: work events, poll payments, tidy what is no longer needed.
import type { Deps } from '#server/deps.ts';
import { dropOldTries } from '#server/platform/limits.ts';
import { dropOldDrafts } from './draft-store.ts';
import { workPaymentEvents } from './event-service.ts';
import { pollPayments } from './poll-service.ts';

const DRAFTS_KEPT_DAYS = 30;

export const givingTasks = (deps: Deps) => ({
  'work-payment-events': async (): Promise<void> => {
    await workPaymentEvents(deps);
  },
  'poll-payments': () => pollPayments(deps),
  tidy: async (): Promise<void> => {
    const before = new Date(deps.clock.now().getTime() - DRAFTS_KEPT_DAYS * 86_400_000);
    await deps.db.transaction(async (trx) => {
      await dropOldDrafts(trx, before);
      await dropOldTries(trx);
    });
  },
});
