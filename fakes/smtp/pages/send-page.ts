// Sends a page with headers that let it do nothing but what it is for.
import type { Response } from 'express';
import type { ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';

const PAGE_POLICY =
  "default-src 'none'; style-src 'self'; font-src 'self'; img-src data:; frame-src 'self'; base-uri 'none'; frame-ancestors 'none'; form-action 'self'";
/** A letter's own HTML may colour itself and open a link in a new page, and nothing else. */
const LETTER_POLICY =
  "default-src 'none'; style-src 'unsafe-inline'; img-src data:; base-uri 'none'; form-action 'none'; frame-ancestors 'self'; sandbox allow-popups allow-popups-to-escape-sandbox";

const shut = (policy: string) => ({
  'content-security-policy': policy,
  'cache-control': 'no-store',
  'referrer-policy': 'no-referrer',
  'x-content-type-options': 'nosniff',
  'cross-origin-resource-policy': 'same-origin',
});

export function sendPage(res: Response, status: number, page: ReactElement): void {
  res
    .status(status)
    .set(shut(PAGE_POLICY))
    .type('html')
    .send(`<!doctype html>${renderToStaticMarkup(page)}`);
}

export function sendLetterHtml(res: Response, html: string): void {
  res.set(shut(LETTER_POLICY)).type('html').send(html);
}

export function sendSource(res: Response, source: Buffer): void {
  res.set(shut(LETTER_POLICY)).type('text/plain; charset=utf-8').send(source);
}
