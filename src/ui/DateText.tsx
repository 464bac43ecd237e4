// A day as it stands in a sentence: 3 May 2027.
import { formatDay, type Day } from '#shared/dates.ts';

export function DateText({ day }: { day: Day }) {
  return <time dateTime={day}>{formatDay(day)}</time>;
}
