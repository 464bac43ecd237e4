// Puts a drawn page into the built template.
import { escapeHtml } from '#shared/html-text.ts';
import type { RenderedPage } from './site-build.ts';

// A function as replacement: a `$` in the text would be read as a pattern otherwise.
export const fillTemplate = (
  template: string,
  { head, html, state }: Pick<RenderedPage, 'head' | 'html' | 'state'>,
): string =>
  template
    .replace('<!--app-head-->', () => head)
    .replace('<!--app-html-->', () => html)
    .replace('<!--app-state-->', () => state);

/** The empty page in which the browser draws the desk by itself. */
export const DESK_SHELL = {
  head: '<title>The desk</title>',
  html: '<noscript><p>The desk works in the browser and needs JavaScript. Every public page works without.</p></noscript>',
  state: 'null',
};

/** For when the page cannot be drawn at all; it needs nothing else. */
export const barePage = (title: string, words: string, requestId: string | undefined): string =>
  `<!doctype html><html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${escapeHtml(title)}</title></head><body><main><h1>${escapeHtml(title)}</h1><p>${escapeHtml(words)}</p>${
    requestId === undefined
      ? ''
      : `<p>If you write to us about it, give this number: ${escapeHtml(requestId)}</p>`
  }<p><a href="/">Go to the figure</a></p></main></body></html>`;
