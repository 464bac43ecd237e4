// The worker's job that empties the outbox; nudged by every queued letter and by the sweep.
import { sendDueMail, type MailDeps, type SendingInput } from './send-due-mail.ts';

type TaskInput = {
  /** Read at each run, so that a renamed society writes under its new name at once. */
  findFromName: () => Promise<string>;
  now: () => Date;
  findReasonNotToSend?: SendingInput['findReasonNotToSend'];
};

/** Entries of the worker's task list. */
export function mailTasks(deps: MailDeps, input: TaskInput): { 'send-mail': () => Promise<void> } {
  const { findFromName, now, findReasonNotToSend } = input;
  return {
    'send-mail': async () => {
      const fromName = await findFromName();
      for (;;) {
        const tally = await sendDueMail(deps, { fromName, now, findReasonNotToSend });
        if (tally.claimed === 0 || tally.isServerAway) return;
      }
    },
  };
}
