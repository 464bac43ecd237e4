// Turns of phrase that every letter about a gift shares, in text and in HTML.
import { html, type SafeHtml } from '#server/platform/mail/index.ts';

/** “Dear Mrs Quillan,” from whatever the giver asked for; a greeting that is whole already stays so. */
export function greetingLine(greeting: string, name: string): string {
  const wish = (greeting.trim() || name.trim()).replace(/[,.\s]+$/, '');
  return /^(dear|hello|hi|good (morning|day|evening))\b/i.test(wish) ? `${wish},` : `Dear ${wish},`;
}

export type Dedication = { kind: 'memory' | 'honour'; name: string };

/** “ in memory of Walter Quillan”, or nothing. */
export const dedicationPhrase = (dedication: Dedication | null): string =>
  dedication ? ` in ${dedication.kind} of ${dedication.name}` : '';

export const paragraphs = (texts: readonly string[]): SafeHtml =>
  html`${texts.map((text) => html`<p>${text}</p>`)}`;

/** A plain letter: its paragraphs apart by one empty line; what is null is left out. */
export const plainLetter = (parts: readonly (string | null)[]): string =>
  `${parts.filter((part) => part !== null).join('\n\n')}\n`;

/** The quoted words of somebody, line by line set in from the edge. */
export const quoted = (words: string): string =>
  words
    .split(/\r?\n/)
    .map((line) => `  ${line}`.trimEnd())
    .join('\n');

export type Imprint = {
  societyName: string;
  societyAddress: string;
  registrationStatement: string;
  complaints: string;
};

export const plainImprint = (imprint: Imprint): string =>
  [
    '--------',
    `${imprint.societyName}, ${imprint.societyAddress}`,
    imprint.registrationStatement,
    imprint.complaints,
  ].join('\n');

export const imprintValues = (imprint: Imprint): Record<keyof Imprint, string> => ({
  societyName: imprint.societyName,
  societyAddress: imprint.societyAddress,
  registrationStatement: imprint.registrationStatement,
  complaints: imprint.complaints,
});
