// One gift with its whole chain, as one reader may see it: wording, payment, books, words, letters, history.
import type { GiftChain, GiftEntry } from '#shared/giving/desk-schemas.ts';
import { listPostings, type PostedLine } from '#server/books/index.ts';
import type { Db } from '#server/platform/db.ts';
import { listConsents } from '#server/supporters/index.ts';
import { getGiftHead, listGiftShares, toChainHead, type GiftHead } from './gift-chain-reads.ts';
import { listHistoryOf } from './gift-history-reads.ts';
import { listPaymentEvents } from './gift-payment-reads.ts';
import { tellSteps } from './gift-steps.ts';
import { listGiftMails, listGiftWords } from './gift-words-reads.ts';
import type { Reader } from './withheld-names.ts';

function toEntries(lines: readonly PostedLine[]): GiftEntry[] {
  const entries = new Map<string, GiftEntry>();
  for (const line of lines) {
    const entry = entries.get(line.entryId) ?? {
      id: line.entryId,
      kind: line.kind,
      day: line.day,
      recordedAt: line.recordedAt.toISOString(),
      lines: [],
    };
    entry.lines.push({ account: line.accountName, fund: line.fundName, amountPence: line.amountPence });
    entries.set(line.entryId, entry);
  }
  return [...entries.values()];
}

async function listGiftConsents(db: Db, head: GiftHead): Promise<GiftChain['consents']> {
  const kept = await listConsents(db, 'gift-intent', head.intent_id);
  return kept.map(({ channel, isGiven, version, wording }) => ({ channel, isGiven, version, wording }));
}

/** @throws NotFound when no gift has this number. */
export async function getGiftChain(db: Db, number: number, reader: Reader): Promise<GiftChain> {
  const head = await getGiftHead(db, number, reader);
  const [shares, consents, lines, words, mails, events] = await Promise.all([
    listGiftShares(db, head),
    listGiftConsents(db, head),
    listPostings(db, 'gift', head.id),
    listGiftWords(db, head, reader),
    listGiftMails(db, head, reader),
    listPaymentEvents(db, head),
  ]);
  const told = { ...toChainHead(head), shares, consents, entries: toEntries(lines), words, mails };
  const things = [head.id, head.intent_id, ...words.map((one) => one.id), ...mails.map((one) => one.id)];
  return {
    ...told,
    steps: tellSteps(told, head.begun_at, events),
    history: await listHistoryOf(db, things),
  };
}
