// The giver's own endpoints: sheet, draft, check, checkout, outcome and receipt. Nothing here is ever cached.
import { Router, type CookieOptions, type Request, type Response } from 'express';
import { z } from 'zod';
import { checkoutRequestSchema, checkoutSchema } from '#shared/giving/give-schemas.ts';
import type { Deps } from '#server/deps.ts';
import { NotFound } from '#server/platform/errors.ts';
import { limitTries } from '#server/platform/limits.ts';
import { parse } from '#server/platform/parse.ts';
import { beginCheckout } from './checkout-service.ts';
import { writeDraft } from './draft-service.ts';
import { findDraft, makeToken } from './draft-store.ts';
import { findGiftIdByReceipt } from './gift-store.ts';
import { readCheck, readOutcome, readSheet } from './giving-reads.ts';
import { receiptPdf } from './receipt-pdf.ts';
import { readReceipt } from './receipt-reads.ts';

const DRAFT_KEPT_MS = 30 * 24 * 60 * 60 * 1000;
const tokenSchema = z.string().regex(/^[\w-]{43}$/);
const sheetQuery = z.strictObject({
  towards: z.string().max(80).optional(),
  amount: z.enum(['5', '20', '60', 'other']).optional(),
  other: z.string().max(30).optional(),
});
const draftQuery = z.strictObject({ quiet: z.literal('1').optional() });

const draftCookie = (deps: Deps) => (deps.config.cookie.isSecure ? '__Host-treenail-gift' : 'treenail-gift');

function readDraftToken(deps: Deps, req: Request): string | undefined {
  const name = `${draftCookie(deps)}=`;
  const found = (req.headers.cookie ?? '').split(/;\s*/).find((pair) => pair.startsWith(name));
  return tokenSchema.safeParse(found?.slice(name.length)).data;
}

function setDraftToken(deps: Deps, res: Response, token: string): void {
  const options: CookieOptions = {
    httpOnly: true,
    sameSite: 'lax',
    secure: deps.config.cookie.isSecure,
    path: '/',
    maxAge: DRAFT_KEPT_MS,
  };
  res.cookie(draftCookie(deps), token, options);
}

export function createGiftsRouter(deps: Deps): Router {
  const router = Router();
  router.use((_req, res, next) => {
    res.setHeader('Cache-Control', 'no-store');
    next();
  });
  router.get('/sheet', async (req, res) => {
    const prefill = sheetQuery.catch({}).parse(req.query);
    res.json(await readSheet(deps, readDraftToken(deps, req), prefill));
  });
  router.put(
    '/draft',
    limitTries(deps, { name: 'draft', points: 600, perSeconds: 600 }),
    async (req, res) => {
      const { quiet } = parse(draftQuery, req.query);
      const brought = readDraftToken(deps, req);
      // A token we never gave may have been planted, to read along; it is not taken up.
      const token = brought && (await findDraft(deps.db, brought)) ? brought : makeToken();
      setDraftToken(deps, res, token);
      await writeDraft(deps, token, req.body, quiet === '1');
      res.json({});
    },
  );
  router.get('/check', async (req, res) => {
    res.json(await readCheck(deps, readDraftToken(deps, req)));
  });
  router.post(
    '/checkout',
    limitTries(deps, { name: 'checkout', points: 30, perSeconds: 600 }),
    async (req, res) => {
      const { appealVersion } = parse(checkoutRequestSchema, req.body ?? {});
      res.json(
        checkoutSchema.parse(await beginCheckout(deps, { token: readDraftToken(deps, req), appealVersion })),
      );
    },
  );
  router.get('/:intentId/outcome', async (req, res) => {
    const intentId = z.uuid().safeParse(req.params.intentId);
    if (!intentId.success) throw new NotFound('We know of no gift at this address.');
    res.json(await readOutcome(deps, intentId.data, readDraftToken(deps, req)));
  });
  return router;
}

async function receiptOf(deps: Deps, token: string) {
  const giftId = await findGiftIdByReceipt(deps.db, token);
  if (!giftId) throw new NotFound('There is no receipt at this address.');
  return readReceipt(deps.db, giftId);
}

export function createReceiptsRouter(deps: Deps): Router {
  const router = Router();
  router.get('/:token', async (req, res) => {
    res.setHeader('Cache-Control', 'no-store');
    res.json(await receiptOf(deps, req.params.token));
  });
  return router;
}

/** The receipt as a file; beside the page, outside the API, because a giver clicks on it. */
export function createReceiptFilesRouter(deps: Deps): Router {
  const router = Router();
  router.get('/:token.pdf', async (req, res) => {
    const receipt = await receiptOf(deps, req.params.token);
    const file = await receiptPdf(receipt);
    res.setHeader('Cache-Control', 'no-store');
    res.setHeader('Content-Disposition', `inline; filename="receipt-${receipt.number}.pdf"`);
    res.type('application/pdf').send(file);
  });
  return router;
}
