// Gift Aid arithmetic: the basic rate of tax on the gift grossed up, by the rate in force on the day.
import type { Day } from '#shared/dates.ts';
import { applyRate, NOTHING, type Pence } from '#shared/money.ts';

/** Basic rate of Income Tax in per cent, by the day from which it holds (Income Tax Act 2007, s. 6). */
const BASIC_RATES: readonly { fromDay: Day; percent: number }[] = [{ fromDay: '2008-04-06', percent: 20 }];

/**
 * Tax that can be claimed on a gift: gift × rate ÷ (100 − rate), 25p in the pound at 20 per cent.
 * On one gift this is an estimate to the nearest penny; a claim is reckoned on its total.
 */
export function giftAidOn(giftPence: Pence, day: Day): Pence {
  const rate = BASIC_RATES.findLast((one) => one.fromDay <= day);
  if (!rate) return NOTHING;
  return applyRate(giftPence, { per: rate.percent, of: 100 - rate.percent });
}
