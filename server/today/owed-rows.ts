// Says in words what is owed to whom, how long it has waited and what is to be done. Pure.
import { addDays, dayOf, daysBetween, formatMoment, formatTime, type Day } from '#shared/dates.ts';
import type { PaymentKind } from '#shared/giving/desk-schemas.ts';
import { DEDICATION_WORDS, wordsOfGift } from '#shared/giving/desk-words.ts';
import { formatPence } from '#shared/money.ts';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import type { HangingEvent, HangingIntent, LetterSubject, UnreadWords } from '#server/giving/index.ts';
import type { MailLine } from '#server/platform/mail/index.ts';

/** Words from the public are read within this many days. */
const WORDS_WITHIN_DAYS = 3;
const LETTER_WITHIN_DAYS = 1;

type Wait = Pick<OwedRow, 'due' | 'dueDay' | 'since' | 'waitedDays' | 'waited'>;

/** How long it has waited by London days, and whether the day it was due by is past. */
export function tellWait(since: Date, now: Date, withinDays: number): Wait {
  const [from, today] = [dayOf(since), dayOf(now)];
  const waitedDays = Math.max(0, daysBetween(from, today));
  const promisedBy: Day = addDays(from, withinDays);
  const isLate = promisedBy < today;
  return {
    due: isLate ? 'late' : 'today',
    dueDay: isLate ? promisedBy : today,
    since: since.toISOString(),
    waitedDays,
    waited:
      waitedDays === 0 ? `since ${formatTime(since)}` : waitedDays === 1 ? '1 day' : `${waitedDays} days`,
  };
}

const giftPath = (number: number, place: string): string => `/desk/gifts/${number}#${place}`;

function whatWords(words: UnreadWords): string {
  const name = wordsOfGift(words.kind, words.giftNumber);
  if (words.words === null) return `To be read by the treasurer: the ${name}`;
  const stop = /[.!?]$/.test(words.words) ? '' : '.';
  const told = words.hasContact ? `${stop} The family is told once they are passed.` : '';
  const dedicated =
    words.kind === 'memory' || words.kind === 'honour' ? `, ${DEDICATION_WORDS[words.kind]} of` : ':';
  return `To read, the ${name}${dedicated} “${words.words}”${told}`;
}

export function wordsRow(words: UnreadWords, now: Date, mayJudge: boolean): OwedRow {
  const isReadable = words.words !== null;
  return {
    id: `words-${words.id}`,
    ...tellWait(words.writtenAt, now, WORDS_WITHIN_DAYS),
    what: whatWords(words),
    owedTo: words.hasContact && isReadable ? `${words.giver} and the family` : words.giver,
    detail: [],
    action:
      mayJudge && words.words !== null
        ? {
            kind: 'judge',
            giftNumber: words.giftNumber,
            wordsId: words.id,
            wordsKind: words.kind,
            words: words.words,
          }
        : { kind: 'open', label: `See gift ${words.giftNumber}`, path: giftPath(words.giftNumber, 'words') },
  };
}

const MAIL_FAULTS: Record<string, string> = {
  hard_failed: 'came back',
  uncertain: 'may or may not have gone',
  soft_failed: 'is put off again and again by the mail server',
  queued: 'has not been sent: the worker may be standing still',
  claimed: 'has not been sent: the worker may be standing still',
};

/** `mayAct`: a letter to a hidden giver is the treasurer's to decide; others only learn that it waits. */
export function mailRow(
  mail: MailLine,
  about: LetterSubject | undefined,
  { now, mayAct }: { now: Date; mayAct: boolean },
): OwedRow {
  const fault = MAIL_FAULTS[mail.state] ?? 'has not gone';
  const isThanks = mail.kind === 'gift-thanks';
  const name = isThanks ? 'The thank-you' : 'A letter';
  const of = about ? ` for ${formatPence(about.sumPence)}, gift ${about.giftNumber},` : '';
  const action: OwedRow['action'] = about
    ? {
        kind: 'open',
        label: mayAct ? 'Decide' : `See gift ${about.giftNumber}`,
        path: giftPath(about.giftNumber, 'letters'),
      }
    : { kind: 'look', label: 'See more' };
  return {
    id: `mail-${mail.id}`,
    ...tellWait(mail.createdAt, now, LETTER_WITHIN_DAYS),
    what: `${name}${of} ${fault}`,
    owedTo: about ? (isThanks ? about.giver : 'the family') : 'the reader of the letter',
    detail: about ? [] : [`Letter of the kind “${mail.kind}”`, `Tried ${mail.tries} times`],
    action,
  };
}

const INTENT_WORDS: Record<HangingIntent['state'], string> = {
  started: 'was asked for, but no card page was opened',
  asked: 'had a card page that has run out, and the card service has not said what became of it',
  confirming: 'is still being confirmed by the bank',
  mismatched: 'does not agree with what was asked for: nothing was posted',
};

type PaymentReader = { now: Date; maySettle: boolean };

/** What nobody but the treasurer can end; everything else about payments ends by itself. */
const lookOr = (isSettled: boolean, paymentKind: PaymentKind, paymentId: string): OwedRow['action'] =>
  isSettled
    ? { kind: 'settle', label: 'Settle', paymentKind, paymentId }
    : { kind: 'look', label: 'See more' };

export function intentRow(intent: HangingIntent, { now, maySettle }: PaymentReader): OwedRow {
  return {
    id: `payment-${intent.handle}`,
    ...tellWait(intent.since, now, intent.state === 'mismatched' ? 0 : 1),
    what: `A payment of ${formatPence(intent.sumPence)} ${INTENT_WORDS[intent.state]}`,
    owedTo: intent.state === 'mismatched' ? 'the giver and the books' : 'the books',
    detail: [
      `Begun ${formatMoment(intent.since)}`,
      ...(intent.sessionId ? [`Card page ${intent.sessionId}`] : []),
      ...(intent.checkedAt ? [`Last asked of the card service ${formatMoment(intent.checkedAt)}`] : []),
      ...(intent.fault ? [`Found: ${intent.fault}`] : []),
    ],
    action: lookOr(maySettle && intent.state === 'mismatched', 'intent', intent.handle),
  };
}

export function eventRow(event: HangingEvent, { now, maySettle }: PaymentReader): OwedRow {
  const stands = event.state === 'refused' ? 'was refused' : 'has not been worked';
  return {
    id: `event-${event.id}`,
    ...tellWait(event.since, now, 0),
    what: `What the card service told ${stands}: ${event.type}`,
    owedTo: 'the books',
    detail: [
      `Event ${event.id} of ${event.objectId}, come ${formatMoment(event.since)}`,
      `Tried ${event.tries} times`,
      ...(event.fault ? [event.fault] : []),
    ],
    action: lookOr(maySettle && event.state === 'refused', 'event', event.id),
  };
}
