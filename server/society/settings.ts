// The society's settings, each with its day, its unit and what holds when it was never set.
import { z } from 'zod';
import { dayOf } from '#shared/dates.ts';
import { LEAST_CARD_PENCE, pence, penceSchema, type Pence } from '#shared/money.ts';
import type { Db } from '#server/platform/db.ts';
import { readSettings } from './society-store.ts';

export type GivingSettings = {
  /** The least gift by card; never under the card service's own least. */
  leastGiftPence: Pence;
  /** A gift of this sum or more is said back in words before it is paid. */
  largeGiftPence: Pence;
  /** A gift like the one before within so many minutes is said back in words. */
  repeatedWithinMinutes: number;
  /** A fund that bears card fees instead of each gift's own. */
  cardFeeFundSlug: string | null;
};

export const SETTING_KEYS = {
  leastGift: 'least-gift-pence',
  largeGift: 'large-gift-pence',
  repeatedWithin: 'repeated-gift-minutes',
  cardFeeFund: 'card-fee-fund',
} as const;

const DEFAULT_LEAST = pence(200);
const DEFAULT_LARGE = pence(100_000);
const DEFAULT_REPEATED_MINUTES = 60;

export async function getGivingSettings(db: Db, at: Date): Promise<GivingSettings> {
  const settings = await readSettings(db, dayOf(at));
  const leastGiftPence = penceSchema.catch(DEFAULT_LEAST).parse(settings.get(SETTING_KEYS.leastGift));
  return {
    leastGiftPence: leastGiftPence < LEAST_CARD_PENCE ? LEAST_CARD_PENCE : leastGiftPence,
    largeGiftPence: penceSchema.catch(DEFAULT_LARGE).parse(settings.get(SETTING_KEYS.largeGift)),
    repeatedWithinMinutes: z
      .int()
      .positive()
      .catch(DEFAULT_REPEATED_MINUTES)
      .parse(settings.get(SETTING_KEYS.repeatedWithin)),
    cardFeeFundSlug: z
      .string()
      .nullable()
      .catch(null)
      .parse(settings.get(SETTING_KEYS.cardFeeFund) ?? null),
  };
}
