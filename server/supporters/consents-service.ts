// What supporters agreed to, channel by channel, each with the words that they read.
import { z } from 'zod';
import type { Db, Trx } from '#server/platform/db.ts';

export const CHANNELS = ['email', 'post', 'phone'] as const;
export type Channel = (typeof CHANNELS)[number];

/** One row a channel, given or not: what was not agreed to is as much a record as what was. */
export async function keepConsents(
  trx: Trx,
  consent: {
    supporterId: string;
    wordingId: string;
    given: Record<Channel, boolean>;
    sourceKind: string;
    sourceId: string;
    at: Date;
  },
): Promise<void> {
  await trx('consents').insert(
    CHANNELS.map((channel) => ({
      supporter_id: consent.supporterId,
      channel,
      is_given: consent.given[channel],
      wording_id: consent.wordingId,
      source_kind: consent.sourceKind,
      source_id: consent.sourceId,
      recorded_at: consent.at,
    })),
  );
}

const consentRow = z.object({
  channel: z.enum(CHANNELS),
  is_given: z.boolean(),
  words: z.string(),
  version: z.number(),
});
export type KeptConsent = { channel: Channel; isGiven: boolean; wording: string; version: number };

export async function listConsents(db: Db, sourceKind: string, sourceId: string): Promise<KeptConsent[]> {
  const rows: unknown[] = await db('consents as c')
    .join('wordings as w', 'w.id', 'c.wording_id')
    .where({ 'c.source_kind': sourceKind, 'c.source_id': sourceId })
    .orderBy('c.id')
    .select('c.channel', 'c.is_given', 'w.words', 'w.version');
  return rows.map((row) => {
    const consent = consentRow.parse(row);
    return {
      channel: consent.channel,
      isGiven: consent.is_given,
      wording: consent.words,
      version: consent.version,
    };
  });
}
