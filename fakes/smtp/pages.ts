// The stand-in's web side: pages for people, JSON for programs, on loopback alone.
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import express, { type NextFunction, type Request, type Response } from 'express';
import { createElement } from 'react';
import { z } from 'zod';
import { jsonRoutes } from './json-routes.ts';
import type { KeptLetter, LetterStore } from './letter-store.ts';
import { modeSchema, PAGE_CHOICES, pageChoiceSchema, type ModeHolder, type PageChoice } from './modes.ts';
import { LetterPage } from './pages/LetterPage.tsx';
import { ListPage } from './pages/ListPage.tsx';
import { MissingPage } from './pages/MissingPage.tsx';
import { sendLetterHtml, sendPage, sendSource } from './pages/send-page.ts';
import { createReader } from './read-letter.ts';

const LETTERS_A_PAGE = 50;
const FONTS: Record<string, string> = {
  'lora.woff2': '@fontsource-variable/lora/files/lora-latin-wght-normal.woff2',
  'atkinson.woff2':
    '@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2',
};
const OUR_HOST = /^(127\.0\.0\.1|localhost|\[::1\])(:\d+)?$/;

/** Another site's name that was made to point at this machine is turned away. */
function onlyLoopback(req: Request, res: Response, next: NextFunction): void {
  if (OUR_HOST.test(req.get('host') ?? '')) next();
  else res.status(421).type('text').send('This page is for this machine alone.');
}

const listQuery = z.object({
  words: z.string().trim().max(200).catch(''),
  page: z.coerce.number().int().min(1).catch(1),
});

const hasWords = (letter: KeptLetter, words: string): boolean =>
  [letter.subject, letter.toText, letter.fromText, ...letter.envelopeTo].some((text) =>
    text.toLowerCase().includes(words),
  );

const sameMode = (modes: ModeHolder): PageChoice | null => {
  const now = JSON.stringify(modes.get());
  return (
    pageChoiceSchema.options.find(
      (name) => JSON.stringify(modeSchema.parse(PAGE_CHOICES[name].mode)) === now,
    ) ?? null
  );
};

function sendList(store: LetterStore, modes: ModeHolder, req: Request, res: Response): void {
  const { words, page } = listQuery.parse(req.query);
  const matching = store.list().filter((letter) => hasWords(letter, words.toLowerCase()));
  const pages = Math.max(1, Math.ceil(matching.length / LETTERS_A_PAGE));
  const shown = Math.min(page, pages);
  const letters = matching.slice((shown - 1) * LETTERS_A_PAGE, shown * LETTERS_A_PAGE);
  sendPage(
    res,
    200,
    createElement(ListPage, {
      letters,
      found: matching.length,
      words,
      page: shown,
      pages,
      mode: modes.get(),
      choice: sameMode(modes),
    }),
  );
}

function assets() {
  const router = express.Router();
  const { resolve } = createRequire(import.meta.url);
  router.get('/mail.css', (_req, res) => {
    res.set('cache-control', 'no-cache').sendFile(fileURLToPath(new URL('pages/mail.css', import.meta.url)));
  });
  for (const [name, path] of Object.entries(FONTS))
    router.get(`/fonts/${name}`, (_req, res) => res.sendFile(resolve(path), { maxAge: '1d' }));
  return router;
}

export function createPages(store: LetterStore, modes: ModeHolder) {
  const app = express();
  const readLetter = createReader(store);
  const sendMissing = (res: Response): void => sendPage(res, 404, createElement(MissingPage));
  app.disable('x-powered-by');
  app.use(onlyLoopback, assets(), jsonRoutes(store, modes));
  app.get('/', (req, res) => sendList(store, modes, req, res));
  app.get('/letters/:id', async (req, res) => {
    const letter = await readLetter(req.params.id);
    if (!letter) return sendMissing(res);
    const { plain, html, headers } = letter;
    sendPage(res, 200, createElement(LetterPage, { letter, plain, hasHtml: html !== '', headers }));
  });
  app.get('/letters/:id/html', async (req, res) => {
    const letter = await readLetter(req.params.id);
    if (letter?.html) sendLetterHtml(res, letter.html);
    else sendMissing(res);
  });
  app.get('/letters/:id/source', async (req, res) => {
    const letter = store.find(req.params.id);
    if (letter) sendSource(res, await store.readSource(letter.id));
    else sendMissing(res);
  });
  app.use((_req, res) => sendMissing(res));
  return app;
}
