// Three sentences that say how the figure stands today; remade whenever a part changes.
import { formatPence, type Pence } from '#shared/money.ts';
import type { PartState } from './campaign-schemas.ts';

type DescribedPart = { name: string; state: PartState; stillNeededPence: Pence; topMm: number | null };

const lowerFirst = (name: string): string => name.charAt(0).toLowerCase() + name.slice(1);
const withThe = (name: string): string =>
  /^(the|her|his|a|an) /i.test(name) ? lowerFirst(name) : `the ${lowerFirst(name)}`;
/** “Forearm and hand” and “the 24 panes” are one part each, and more than one thing. */
const isPlural = (name: string): boolean => / and /.test(name) || /[^s]s$/.test(name);
const areMany = (names: readonly string[]): boolean => names.length > 1 || names.some(isPlural);
const isAre = (names: readonly string[]): string => (areMany(names) ? 'are' : 'is');

/** a; a and b; a, b and c */
export const listInWords = (names: readonly string[]): string =>
  new Intl.ListFormat('en-GB', { type: 'conjunction' }).format(names);

const inState = (parts: readonly DescribedPart[], state: PartState): string[] =>
  parts.filter((part) => part.state === state).map((part) => withThe(part.name));

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

function standing(parts: readonly DescribedPart[]): string {
  const placed = inState(parts, 'placed');
  if (placed.length === 0) return 'Nothing of the figure stands yet.';
  const topMm = Math.max(
    0,
    ...parts.filter((part) => part.state === 'placed').map((part) => part.topMm ?? 0),
  );
  const height = topMm > 0 ? ` The figure stands ${formatMetres(topMm)} above the ground today.` : '';
  if (placed.length === parts.length) return 'The whole figure is in place.';
  return `${capital(listInWords(placed))} ${isAre(placed)} in place.${height}`;
}

function making(parts: readonly DescribedPart[]): string {
  const beingMade = inState(parts, 'making');
  const waiting = inState(parts, 'paid');
  const made =
    beingMade.length > 0 ? `${capital(listInWords(beingMade))} ${isAre(beingMade)} being made` : '';
  const paid =
    waiting.length > 0 ? `${listInWords(waiting)} ${isAre(waiting)} paid for and next in turn` : '';
  if (made && paid) return `${made}; ${paid}.`;
  if (made) return `${made}.`;
  if (paid) return `${capital(paid)}.`;
  return 'Nothing is being made just now.';
}

function needing(parts: readonly DescribedPart[]): string {
  const unpaid = parts.filter((part) => part.stillNeededPence > 0);
  const [next, ...later] = unpaid;
  if (!next) return 'Every part is paid for.';
  const first = `${capital(withThe(next.name))} ${isPlural(next.name) ? 'need' : 'needs'} ${formatPence(next.stillNeededPence)} more`;
  const after = later.map((part) => withThe(part.name));
  return after.length === 0
    ? `${first}.`
    : `${first}; after that ${areMany(after) ? 'come' : 'comes'} ${listInWords(after)}.`;
}

/** 0.5 m, 4.92 m: millimetres in metres without needless noughts. */
export const formatMetres = (heightMm: number): string =>
  `${new Intl.NumberFormat('en-GB', { maximumFractionDigits: 2 }).format(heightMm / 1000)} m`;

/** Parts in building order. */
export const describeFigure = (parts: readonly DescribedPart[]): string[] => [
  standing(parts),
  making(parts),
  needing(parts),
];
