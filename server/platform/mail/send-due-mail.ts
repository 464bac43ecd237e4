// Sends what is due from the outbox. Each step is committed before the next, so that no crash sends twice.
import type { Clock } from '../clock.ts';
import type { Db } from '../db.ts';
import type { Log } from '../log.ts';
import type { HandOver, Mailer } from './mailer.ts';
import {
  beginHandOver,
  claimDue,
  recordOutcome,
  releaseAbandoned,
  releaseClaim,
  suppressClaim,
  type ClaimedLetter,
  type Hold,
  type Outcome,
} from './outbox-store.ts';
import { UNSAFE_ADDRESS } from './outbox.ts';
import { isPlainAddress } from './plain-address.ts';

export type MailDeps = { db: Db; mailer: Pick<Mailer, 'send'>; clock: Clock; log: Log };

export type SendingInput = {
  /** The name that letters come from. */
  fromName: string;
  /** The real time, for leases and waiting; the demonstration's clock would let them run out at a jump. */
  now: () => Date;
  limit?: number;
  /** Asked right before each hand-over: words say why this letter must not go out after all. */
  findReasonNotToSend?: (letter: ClaimedLetter) => Promise<string | undefined>;
};

type Counts = { claimed: number; sent: number; failed: number; uncertain: number; suppressed: number };
export type SendingTally = Counts & {
  /** The mail server could not be spoken to: stop, and let the next sweep try again. */
  isServerAway: boolean;
};

const LEASE_MS = 2 * 60_000;
const MINUTE_MS = 60_000;
/** What is waited after the first, second … failed try; after the last of them the letter has failed. */
const WAIT_MINUTES = [1, 5, 15, 60, 24 * 60];
const LETTERS_AT_ONCE = 20;

const after = (moment: Date, ms: number): Date => new Date(moment.getTime() + ms);

function toOutcome(
  answer: HandOver,
  { tries, now, clock }: { tries: number; now: Date; clock: Clock },
): Outcome {
  const { response } = answer;
  switch (answer.kind) {
    case 'taken':
      return { state: 'sent', response, sentAt: clock.now() };
    case 'uncertain':
      return { state: 'uncertain', response };
    case 'hard':
      return { state: 'hard_failed', response };
    case 'soft': {
      const waitMinutes = WAIT_MINUTES[tries - 1];
      return waitMinutes === undefined
        ? { state: 'hard_failed', response: `Given up after ${tries} tries. ${response}` }
        : { state: 'soft_failed', response, nextTryAt: after(now, waitMinutes * MINUTE_MS) };
    }
  }
}

const TALLIED = {
  sent: 'sent',
  soft_failed: 'failed',
  hard_failed: 'failed',
  uncertain: 'uncertain',
} as const;

async function reasonNotToSend(letter: ClaimedLetter, input: SendingInput): Promise<string | undefined> {
  return isPlainAddress(letter.toAddress) ? input.findReasonNotToSend?.(letter) : UNSAFE_ADDRESS;
}

type Handed = { tally?: keyof Counts; isServerAway: boolean };

async function handOver(
  deps: MailDeps,
  letter: ClaimedLetter,
  hold: Hold,
  input: SendingInput,
): Promise<Handed> {
  const reason = await reasonNotToSend(letter, input);
  if (reason) {
    await deps.db.transaction((trx) => suppressClaim(trx, hold, reason));
    return { tally: 'suppressed', isServerAway: false };
  }
  const handingOverAt = input.now();
  const tries = await deps.db.transaction((trx) =>
    beginHandOver(trx, hold, { now: handingOverAt, leaseUntil: after(handingOverAt, LEASE_MS) }),
  );
  if (tries === undefined) return { isServerAway: false };
  const answer = await deps.mailer.send(letter, input.fromName);
  const outcome = toOutcome(answer, { tries, now: input.now(), clock: deps.clock });
  await deps.db.transaction((trx) => recordOutcome(trx, { id: letter.id, handingOverAt }, outcome));
  if (outcome.state !== 'sent')
    deps.log.warn(
      { mailId: letter.id, kind: letter.kind, state: outcome.state, tries },
      'a letter was not sent',
    );
  return { tally: TALLIED[outcome.state], isServerAway: answer.kind !== 'taken' && answer.isServerAway };
}

/** Sends up to `limit` due letters. When the mail server itself is away, the rest wait without losing a try. */
export async function sendDueMail(deps: MailDeps, input: SendingInput): Promise<SendingTally> {
  const claimedAt = input.now();
  const leaseUntil = after(claimedAt, LEASE_MS);
  const letters = await deps.db.transaction(async (trx) => {
    await releaseAbandoned(trx, claimedAt);
    return claimDue(trx, { now: claimedAt, leaseUntil, limit: input.limit ?? LETTERS_AT_ONCE });
  });
  const counts: Counts = { claimed: letters.length, sent: 0, failed: 0, uncertain: 0, suppressed: 0 };
  let isServerAway = false;
  for (const letter of letters) {
    const hold = { id: letter.id, leaseUntil };
    if (isServerAway) {
      await deps.db.transaction((trx) => releaseClaim(trx, hold));
      continue;
    }
    const handed = await handOver(deps, letter, hold, input);
    if (handed.tally) counts[handed.tally] += 1;
    isServerAway = handed.isServerAway;
  }
  return { ...counts, isServerAway };
}
