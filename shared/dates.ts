// Days and moments: instants are UTC, a day is a day in London.
import { z } from 'zod';

export const TIME_ZONE = 'Europe/London';
/** A calendar day as YYYY-MM-DD. */
export const daySchema = z.iso.date();
export type Day = string;

const dayParts = new Intl.DateTimeFormat('en-CA', {
  timeZone: TIME_ZONE,
  year: 'numeric',
  month: '2-digit',
  day: '2-digit',
});
const longDay = new Intl.DateTimeFormat('en-GB', {
  timeZone: 'UTC',
  day: 'numeric',
  month: 'long',
  year: 'numeric',
});
const weekday = new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', weekday: 'long' });
const monthName = new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', month: 'long' });
const clockTime = new Intl.DateTimeFormat('en-GB', {
  timeZone: TIME_ZONE,
  hour: 'numeric',
  minute: '2-digit',
  hourCycle: 'h12',
});

/** The London day in which a moment falls. */
export const dayOf = (moment: Date): Day => dayParts.format(moment);

const noonOf = (day: Day): Date => new Date(`${day}T12:00:00Z`);

/** 3 May 2027 */
export const formatDay = (day: Day): string => longDay.format(noonOf(day));
export const weekdayOf = (day: Day): string => weekday.format(noonOf(day));
export const monthOf = (day: Day): string => monthName.format(noonOf(day));
export const dayOfMonth = (day: Day): number => Number(day.slice(8));

export function addDays(day: Day, days: number): Day {
  const moved = noonOf(day);
  moved.setUTCDate(moved.getUTCDate() + days);
  return moved.toISOString().slice(0, 10);
}

/** Whole days from the first to the second; negative when the second is earlier. */
export const daysBetween = (from: Day, to: Day): number =>
  Math.round((noonOf(to).getTime() - noonOf(from).getTime()) / 86_400_000);

/** 9.30am, 4pm: a London clock, without needless noughts. */
export function formatTime(moment: Date): string {
  const parts = Object.fromEntries(clockTime.formatToParts(moment).map((part) => [part.type, part.value]));
  const half = (parts.dayPeriod ?? '').replaceAll(/[.\s]/g, '').toLowerCase();
  return parts.minute === '00' ? `${parts.hour}${half}` : `${parts.hour}.${parts.minute}${half}`;
}

/** 3 May 2027, 9.30am */
export const formatMoment = (moment: Date): string => `${formatDay(dayOf(moment))}, ${formatTime(moment)}`;
