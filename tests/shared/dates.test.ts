// Days are London's: the hour of summer time moves a moment into another day.
import { expect, test } from 'vitest';
import { addDays, dayOf, daysBetween, formatDay, formatMoment, formatTime } from '#shared/dates.ts';

test('a moment late on a summer evening belongs to the next London day', () => {
  expect(dayOf(new Date('2027-05-31T23:30:00Z'))).toBe('2027-06-01');
  expect(dayOf(new Date('2027-01-31T23:30:00Z'))).toBe('2027-01-31');
});

test('days and times are written the society’s way', () => {
  expect(formatDay('2027-05-03')).toBe('3 May 2027');
  expect(formatTime(new Date('2027-05-03T08:30:00Z'))).toBe('9.30am');
  expect(formatTime(new Date('2027-12-03T16:00:00Z'))).toBe('4pm');
  expect(formatMoment(new Date('2027-05-03T11:05:00Z'))).toBe('3 May 2027, 12.05pm');
});

test('days are counted over the change of the clocks', () => {
  expect(addDays('2027-03-27', 2)).toBe('2027-03-29');
  expect(daysBetween('2027-03-01', '2027-04-01')).toBe(31);
  expect(daysBetween('2027-04-01', '2027-03-01')).toBe(-31);
});
