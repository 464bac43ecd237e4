// Sends a page with headers that let it do nothing but what it is for.
import type { ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import type { Response } from 'express';

const originOf = (address: string | null): string[] =>
  address && URL.canParse(address) ? [new URL(address).origin] : [];

/** `addresses` are those that a form's answer may lead to: a browser holds redirects of a form to the same rule. */
export function sendPage(
  res: Response,
  status: number,
  page: ReactElement,
  addresses: readonly (string | null)[] = [],
): void {
  const formTargets = ["'self'", ...new Set(addresses.flatMap(originOf))].join(' ');
  res
    .status(status)
    .set({
      'content-security-policy': `default-src 'none'; style-src 'self'; script-src 'self'; base-uri 'none'; frame-ancestors 'none'; form-action ${formTargets}`,
      'cache-control': 'no-store',
      'referrer-policy': 'no-referrer',
      'x-content-type-options': 'nosniff',
    })
    .type('html')
    .send(`<!doctype html>${renderToStaticMarkup(page)}`);
}
