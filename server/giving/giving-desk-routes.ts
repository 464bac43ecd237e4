// The desk's gifts: the ledger list, its CSV, one gift's chain, the verdict on words and on letters.
import { pipeline } from 'node:stream/promises';
import { Readable } from 'node:stream';
import { Router, type RequestHandler } from 'express';
import { z } from 'zod';
import { dayOf } from '#shared/dates.ts';
import {
  doneSchema,
  giftChainSchema,
  giftFilterSchema,
  giftListSchema,
  judgeWordsSchema,
  PAYMENT_KINDS,
  settleMailSchema,
  settlePaymentSchema,
} from '#shared/giving/desk-schemas.ts';
import { deskPerson, recordAudit, requireRole } from '#server/accounts/index.ts';
import type { Deps } from '#server/deps.ts';
import { parse } from '#server/platform/parse.ts';
import { NotFound } from '#server/platform/errors.ts';
import { requestIdOf } from '#server/platform/problems.ts';
import { createCsvStream, readGiftCells } from './gift-csv.ts';
import { getGiftChain } from './gift-desk-reads.ts';
import { getGiftList } from './gift-list-reads.ts';
import { settleLetter } from './letter-desk-service.ts';
import { settlePayment } from './payment-desk-service.ts';
import { GIFT_ROLES, PEOPLE_ROLES } from './withheld-names.ts';
import { judgeWords } from './words-service.ts';

const MOST_GIFTS = 999_999_999;

/** Whatever is no number or id of ours is an address at which nothing stands. */
const giftNumber = (text: unknown): number => {
  const parsed = z
    .string()
    .regex(/^[1-9]\d{0,8}$/)
    .transform(Number)
    .pipe(z.int().max(MOST_GIFTS))
    .safeParse(text);
  if (!parsed.success) throw new NotFound('There is no gift at this address.');
  return parsed.data;
};
const uuidOf = (text: unknown): string => {
  const parsed = z.uuid().safeParse(text);
  if (!parsed.success) throw new NotFound();
  return parsed.data;
};

const settlePaymentRoute =
  (deps: Deps): RequestHandler =>
  async (req, res) => {
    const kind = z.enum(PAYMENT_KINDS).safeParse(req.params.kind);
    const handle = z.string().min(1).max(255).safeParse(req.params.id);
    if (!kind.success || !handle.success) throw new NotFound('There is no such payment.');
    const looked = {
      ...parse(settlePaymentSchema, req.body ?? {}),
      kind: kind.data,
      handle: handle.data,
      requestId: requestIdOf(res),
    };
    await deps.db.transaction((trx) => settlePayment(deps, trx, deskPerson(req), looked));
    res.json(doneSchema.parse({}));
  };

const sendCsv =
  (deps: Deps): RequestHandler =>
  async (req, res) => {
    const filter = { ...parse(giftFilterSchema, req.query), after: '' };
    const person = deskPerson(req);
    const at = deps.clock.now();
    const requestId = requestIdOf(res);
    await deps.db.transaction((trx) =>
      recordAudit(trx, {
        at,
        actor: { kind: 'desk', accountId: person.accountId },
        action: 'gifts-exported',
        objectKind: 'gift-list',
        objectId: new URLSearchParams(filter).toString(),
        ...(requestId !== undefined && { requestId }),
      }),
    );
    res.setHeader('Content-Type', 'text/csv; charset=utf-8');
    res.setHeader('Content-Disposition', `attachment; filename="gifts-${dayOf(at)}.csv"`);
    await pipeline(Readable.from(readGiftCells(deps.db, filter, person)), createCsvStream(), res);
  };

/** Below /api/desk, behind `requireDesk`. */
export function createGivingDeskRouter(deps: Deps): Router {
  const router = Router();
  const mayRead = requireRole(...GIFT_ROLES);
  const mayJudge = requireRole(...PEOPLE_ROLES);
  router.get('/gifts', mayRead, async (req, res) => {
    const list = await getGiftList(deps.db, parse(giftFilterSchema, req.query), deskPerson(req));
    res.json(giftListSchema.parse(list));
  });
  router.get('/gifts.csv', mayRead, sendCsv(deps));
  router.get('/gifts/:number', mayRead, async (req, res) => {
    const chain = await getGiftChain(deps.db, giftNumber(req.params.number), deskPerson(req));
    res.json(giftChainSchema.parse(chain));
  });
  router.post('/gifts/:number/words/:id', mayJudge, async (req, res) => {
    const judgement = {
      ...parse(judgeWordsSchema, req.body ?? {}),
      giftNumber: giftNumber(req.params.number),
      wordsId: uuidOf(req.params.id),
      requestId: requestIdOf(res),
    };
    await deps.db.transaction((trx) => judgeWords(deps, trx, deskPerson(req), judgement));
    res.json(doneSchema.parse({}));
  });
  router.post('/mail/:id/settle', mayJudge, async (req, res) => {
    const decision = {
      ...parse(settleMailSchema, req.body ?? {}),
      mailId: uuidOf(req.params.id),
      requestId: requestIdOf(res),
    };
    await deps.db.transaction((trx) => settleLetter(deps, trx, deskPerson(req), decision));
    res.json(doneSchema.parse({}));
  });
  router.post('/payments/:kind/:id/settle', requireRole('treasurer'), settlePaymentRoute(deps));
  return router;
}
