// Turns what came over HTTP into the standard Request that the page's loaders and actions take.
import type { Request as HttpRequest } from 'express';
import express from 'express';

const MOST_FORM_BYTES = 64 * 1024;
export const FORM_TYPE = 'application/x-www-form-urlencoded';

/** Reads a posted form whole and unparsed: the page's action reads it. */
export const readForm = express.raw({ type: FORM_TYPE, limit: MOST_FORM_BYTES });

/** @param requestId is told to the reader if the page fails */
export function toPageRequest(
  req: HttpRequest,
  publicAddress: string,
  { signal, requestId }: { signal: AbortSignal; requestId: string | undefined },
): Request {
  // The path is put behind our own address as it is: taken as a reference, //elsewhere would name another host.
  const url = `${publicAddress}${req.originalUrl}`;
  const headers = new Headers(requestId === undefined ? {} : { 'x-request-id': requestId });
  if (req.method !== 'POST') return new Request(url, { headers, signal });
  const body: unknown = req.body;
  headers.set('content-type', FORM_TYPE);
  return new Request(url, {
    method: 'POST',
    headers,
    signal,
    body: Buffer.isBuffer(body) ? body.toString('utf8') : '',
  });
}

/** The same page for everybody: no cookie, no query, no reader. */
export const toKeptRequest = (publicAddress: string, path: string): Request =>
  new Request(`${publicAddress}${path}`);
