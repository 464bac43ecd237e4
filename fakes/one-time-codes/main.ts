// Stands in for the phones of the demonstration's people: a page with the code that each one's phone would show now.
import { fileURLToPath } from 'node:url';
import express from 'express';
import { createElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { z } from 'zod';
import { DEMONSTRATION_PEOPLE } from '#seeds/demonstration-people.ts';
import { CodesPage } from './CodesPage.tsx';
import { readCodes, secondsLeft } from './codes.ts';

const POLICY = "default-src 'none'; style-src 'self'; script-src 'self'; connect-src 'self'; base-uri 'none'";

const { ONE_TIME_CODES_PORT: port } = z
  .object({ ONE_TIME_CODES_PORT: z.coerce.number().int().min(0).max(65_535) })
  .parse(process.env);

const app = express();
app.disable('x-powered-by');
app.get('/', async (_req, res) => {
  const now = new Date();
  const codes = await readCodes(DEMONSTRATION_PEOPLE, now);
  const page = renderToStaticMarkup(createElement(CodesPage, { codes, secondsLeft: secondsLeft(now) }));
  res.set({
    'cache-control': 'no-store',
    'content-security-policy': POLICY,
    'referrer-policy': 'no-referrer',
  });
  res.send(`<!doctype html>${page}`);
});
for (const name of ['codes.css', 'codes-page.js'])
  app.get(`/${name}`, (_req, res) => {
    res.set('cache-control', 'no-cache').sendFile(fileURLToPath(new URL(name, import.meta.url)));
  });

const server = app.listen(port, '127.0.0.1', (error) => {
  if (error) throw error;
  console.log(`one-time codes: http://127.0.0.1:${port}`);
});
for (const signal of ['SIGTERM', 'SIGINT'] as const)
  process.once(signal, () => {
    server.close(() => process.exit(0));
    server.closeAllConnections();
  });
