// Builds pieces of a letter's HTML in which people's words can only ever be words.
import { escapeHtml } from '#shared/html-text.ts';

/** HTML that was built here, with every value in it escaped. */
export type SafeHtml = { readonly safeHtml: string };

type Value = string | SafeHtml | readonly SafeHtml[];

const fill = (value: Value): string =>
  typeof value === 'string'
    ? escapeHtml(value)
    : 'safeHtml' in value
      ? value.safeHtml
      : value.map((one) => one.safeHtml).join('');

/** html`<p>${words}</p>`: text is escaped, pieces built the same way are taken as they are. */
export function html(pieces: TemplateStringsArray, ...values: Value[]): SafeHtml {
  return {
    safeHtml: pieces
      .map((piece, index) => piece + (index < values.length ? fill(values[index] ?? '') : ''))
      .join(''),
  };
}

export const toHtml = (value: Value): string => fill(value);
