// The hosted page of a session: shows it, takes the card, asks for confirmation, and leads back to the society's site.
import express from 'express';
import type { Request, Response } from 'express';
import { createElement } from 'react';
import { z } from 'zod';
import { expireOverdueSessions } from '../payments/expiry.ts';
import { answerConfirmation, payWithCard } from '../payments/take-payment.ts';
import type { Service } from '../service.ts';
import type { SessionRow } from '../state/rows.ts';
import { findNamed } from '../state/store.ts';
import { reasonOf } from '../test-cards.ts';
import { CardPage } from './CardPage.tsx';
import { ConfirmPage } from './ConfirmPage.tsx';
import { EndPage } from './EndPage.tsx';
import { pageAssets } from './assets.ts';
import { FIRST_CARD, readCardForm, startForm } from './card-form.ts';
import type { CardForm } from './card-form.ts';
import { sendPage } from './send-page.ts';
import { formatSum } from './words.ts';

const sumOf = ({ session }: SessionRow): string =>
  formatSum(session.amount_total ?? 0, session.currency ?? 'gbp');
const pathOf = ({ session }: SessionRow): string => `/pay/${session.id}`;
const targetsOf = ({ session }: SessionRow) => [session.success_url, session.cancel_url];
const successOf = ({ session }: SessionRow): string =>
  (session.success_url ?? '').replaceAll('{CHECKOUT_SESSION_ID}', session.id);

function refusalOf(service: Service, { session }: SessionRow): string | null {
  const fault = findNamed(service.store.intents, session.payment_intent)?.last_payment_error;
  return fault ? reasonOf(fault.code, fault.decline_code) : null;
}

function sendCardPage(service: Service, res: Response, row: SessionRow, typed?: CardForm): void {
  const page = createElement(CardPage, {
    action: pathOf(row),
    sum: sumOf(row),
    items: row.lineItems.map((item) => item.description ?? ''),
    description: row.productDescription,
    cancelUrl: row.session.cancel_url,
    chosen: typed ? (typed.card?.number ?? '') : FIRST_CARD,
    expiry: (typed?.form ?? startForm(service)).expiry,
    code: (typed?.form ?? startForm(service)).code,
    faults: typed?.faults ?? {},
    refusal: typed ? null : refusalOf(service, row),
  });
  sendPage(res, typed ? 422 : 200, page, targetsOf(row));
}

function sendEnd(res: Response, row: SessionRow | undefined): void {
  if (!row) {
    const words = 'There is no payment at this address. Go back to the page you came from and start again.';
    return sendPage(res, 404, createElement(EndPage, { heading: 'Nothing to pay here', words }));
  }
  const { session } = row;
  if (session.status === 'complete')
    return sendPage(
      res,
      200,
      createElement(EndPage, {
        heading: 'This payment is done',
        words: 'The card has been given already, and nothing is taken twice.',
        link: { href: successOf(row), words: 'Go on' },
      }),
    );
  const link = session.cancel_url ? { href: session.cancel_url, words: 'Go back' } : undefined;
  const words =
    'The time for this payment has run out. Nothing was taken; you can go back and start it again.';
  sendPage(res, 410, createElement(EndPage, { heading: 'Too late to pay here', words, link }));
}

/** Where the payer goes once the card was given. */
function leadOn(res: Response, row: SessionRow): void {
  if (row.session.status === 'complete') return res.redirect(303, successOf(row));
  res.redirect(303, row.askedCard ? `${pathOf(row)}/confirm` : pathOf(row));
}

const answerSchema = z
  .object({ answer: z.enum(['confirm', 'leave']).catch('leave') })
  .catch({ answer: 'leave' });

export function cardPages(service: Service) {
  const router = express.Router();
  const withOpen =
    (work: (row: SessionRow, req: Request, res: Response) => void) => (req: Request, res: Response) => {
      expireOverdueSessions(service);
      const row = service.store.sessions.find(String(req.params.id));
      if (row?.session.status === 'open') return work(row, req, res);
      // Pressed twice: the second press goes where the first one led.
      if (row?.session.status === 'complete' && req.method === 'POST') return leadOn(res, row);
      sendEnd(res, row);
    };
  router.use(pageAssets());
  router.use(express.urlencoded({ extended: false, limit: '10kb' }));
  router.get(
    '/:id',
    withOpen((row, _req, res) => sendCardPage(service, res, row)),
  );
  router.post(
    '/:id',
    withOpen((row, req, res) => {
      const typed = readCardForm(service, req.body);
      if (!typed.card || Object.keys(typed.faults).length > 0) return sendCardPage(service, res, row, typed);
      leadOn(res, payWithCard(service, row, typed.card));
    }),
  );
  router.get(
    '/:id/confirm',
    withOpen((row, _req, res) => {
      if (!row.askedCard) return res.redirect(303, pathOf(row));
      const props = { action: `${pathOf(row)}/confirm`, sum: sumOf(row), lastFour: row.askedCard.slice(-4) };
      sendPage(res, 200, createElement(ConfirmPage, props), targetsOf(row));
    }),
  );
  router.post(
    '/:id/confirm',
    withOpen((row, req, res) => {
      const isConfirmed = answerSchema.parse(req.body).answer === 'confirm';
      leadOn(res, answerConfirmation(service, row, isConfirmed));
    }),
  );
  return router;
}
