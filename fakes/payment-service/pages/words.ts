// How sums, card numbers and moments are written on the stand-in's pages.

export const formatSum = (minorUnits: number, currency: string): string =>
  new Intl.NumberFormat('en-GB', { style: 'currency', currency }).format(minorUnits / 100);

/** In fours, as on a card. */
export const spaced = (cardNumber: string): string => cardNumber.replace(/(\d{4})(?=\d)/g, '$1 ');

const moment = new Intl.DateTimeFormat('en-GB', {
  dateStyle: 'medium',
  timeStyle: 'medium',
  timeZone: 'Europe/London',
});
export const formatMoment = (at: Date): string => moment.format(at);
