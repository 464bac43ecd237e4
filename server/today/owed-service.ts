// Asks the lower rooms what each is owed and puts it in one list, soonest first, for one person.
import type { OwedRow, Today } from '#shared/today/today-schemas.ts';
import { dayOf } from '#shared/dates.ts';
import {
  GIFT_ROLES,
  listGiftHistory,
  listHangingPayments,
  listLetterSubjects,
  listUnreadWords,
  mayAct,
  type Reader,
} from '#server/giving/index.ts';
import type { Db } from '#server/platform/db.ts';
import { listOwedMail } from '#server/platform/mail/index.ts';
import { listFailedChecks, listNeverRunChecks } from './check-reads.ts';
import { failedCheckRow, neverRunRow, stillChecksRow } from './check-rows.ts';
import { eventRow, intentRow, mailRow, wordsRow } from './owed-rows.ts';

const HISTORY_MS = 24 * 60 * 60_000;
const HISTORY_LINES = 12;

const mayReadGifts = (person: Reader): boolean =>
  person.roles.some((role) => GIFT_ROLES.some((one) => one === role));

async function owedLetters(db: Db, person: Reader, now: Date): Promise<OwedRow[]> {
  const mails = await listOwedMail(db, now);
  const subjects = await listLetterSubjects(db, [...new Set(mails.map((mail) => mail.subjectId))], person);
  return mails.map((mail) => {
    const about = subjects.find((one) => one.subjectId === mail.subjectId);
    return mailRow(mail, about, { now, mayAct: about !== undefined && mayAct(person, about.isWithheld) });
  });
}

const soonestFirst = (one: OwedRow, other: OwedRow): number =>
  one.dueDay.localeCompare(other.dueDay) ||
  one.since.localeCompare(other.since) ||
  one.id.localeCompare(other.id);

/** Nothing of gifts for those who do not read gifts. */
export async function listOwed(db: Db, person: Reader, now: Date): Promise<OwedRow[]> {
  if (!mayReadGifts(person)) return [];
  const reader = { now, maySettle: person.roles.includes('treasurer') };
  const [words, payments, letters, checks, neverRun] = await Promise.all([
    listUnreadWords(db, person),
    listHangingPayments(db, now),
    owedLetters(db, person, now),
    listFailedChecks(db, now),
    listNeverRunChecks(db),
  ]);
  return [
    ...words.map((one) => wordsRow(one, now, mayAct(person, one.isWithheld))),
    ...payments.intents.map((one) => intentRow(one, reader)),
    ...payments.events.map((one) => eventRow(one, reader)),
    ...letters,
    ...checks.filter((one) => one.faults > 0).map((one) => failedCheckRow(one, now)),
    ...stillChecksRow(
      checks.filter((one) => one.faults === 0),
      now,
    ),
    ...neverRunRow(neverRun, now),
  ].sort(soonestFirst);
}

export async function readToday(db: Db, person: Reader, now: Date): Promise<Today> {
  const since = new Date(now.getTime() - HISTORY_MS);
  const readsGifts = mayReadGifts(person);
  const [rows, history] = await Promise.all([
    listOwed(db, person, now),
    readsGifts ? listGiftHistory(db, since, HISTORY_LINES) : [],
  ]);
  return { day: dayOf(now), mayReadGifts: readsGifts, rows, history };
}
