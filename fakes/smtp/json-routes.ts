// The stand-in as programs use it: the letters as JSON, forgetting them, and how to behave.
import express, { type Request, type Response } from 'express';
import { createReader } from './read-letter.ts';
import type { LetterStore } from './letter-store.ts';
import { modeSchema, PAGE_CHOICES, pageChoiceSchema, type ModeHolder } from './modes.ts';

/** A page of another site may post a form here, so a form must say that it comes from our own page. */
const isOwnForm = (req: Request): boolean => {
  const site = req.get('sec-fetch-site');
  if (site) return site === 'same-origin' || site === 'none';
  const origin = req.get('origin');
  return origin === undefined || origin === `http://${req.get('host')}`;
};

function setFromPage(modes: ModeHolder, req: Request, res: Response): void {
  const body: unknown = req.body;
  const choice = pageChoiceSchema.safeParse(
    typeof body === 'object' && body !== null && 'choice' in body ? body.choice : undefined,
  );
  if (!isOwnForm(req) || !choice.success) return void res.status(400).type('text').send('Not understood.');
  modes.set(PAGE_CHOICES[choice.data].mode);
  res.redirect(303, '/');
}

export function jsonRoutes(store: LetterStore, modes: ModeHolder) {
  const router = express.Router();
  const readLetter = createReader(store);
  router.get('/messages', (_req, res) => void res.json({ messages: store.list() }));
  router.get('/messages/:id', async (req, res) => {
    const letter = await readLetter(req.params.id);
    if (letter) res.json(letter);
    else res.status(404).json({ fault: 'There is no such letter.' });
  });
  router.delete('/messages', (_req, res) => {
    store.clear();
    res.status(204).end();
  });
  router.get('/mode', (_req, res) => void res.json(modes.get()));
  router.post('/mode', express.json(), express.urlencoded({ extended: false }), (req, res) => {
    if (req.is('application/x-www-form-urlencoded')) return setFromPage(modes, req, res);
    const mode = modeSchema.safeParse(req.is('application/json') ? req.body : undefined);
    if (!mode.success) return void res.status(400).json({ faults: mode.error.issues });
    res.json(modes.set(mode.data));
  });
  return router;
}
