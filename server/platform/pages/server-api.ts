// Asks our own API in process while a page is drawn, in the name of the browser that asked for the page.
import type { Request } from 'express';
import { createCookieJar } from './cookie-jar.ts';
import type { InProcess } from './in-process.ts';
import type { Exchange } from './site-build.ts';

/** What the guards and the log of the API look at must be what the browser sent. */
const FORWARDED = [
  'origin',
  'sec-fetch-site',
  'user-agent',
  'accept-language',
  'x-forwarded-for',
  'x-forwarded-proto',
  'host',
] as const;

export type PageApi = { exchange: Exchange; setCookies(): string[] };

function forwardedHeaders(req: Request): Record<string, string> {
  const headers: Record<string, string> = {};
  for (const name of FORWARDED) {
    const value = req.get(name);
    if (value !== undefined) headers[name] = value;
  }
  return headers;
}

/** @param req the browser's request, or null for a page that is the same for everybody */
export function createPageApi(ask: InProcess, req: Request | null): PageApi {
  const jar = createCookieJar(req?.get('cookie') ?? '');
  const forwarded = req ? forwardedHeaders(req) : {};
  const exchange: Exchange = async ({ method, path, body }) => {
    const cookie = jar.header();
    const answer = await ask({
      method,
      path,
      headers: {
        ...forwarded,
        accept: 'application/json',
        ...(cookie !== '' && { cookie }),
        ...(body !== undefined && { 'content-type': 'application/json' }),
      },
      body: body === undefined ? undefined : JSON.stringify(body),
      remoteAddress: req?.socket.remoteAddress,
    });
    jar.take(answer.setCookies);
    return { status: answer.status, text: answer.text };
  };
  return { exchange, setCookies: () => jar.given() };
}
