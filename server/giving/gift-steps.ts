// Tells what happened to one gift, step by step in words, oldest first. Pure: it is given only what may be seen.
import { formatDay } from '#shared/dates.ts';
import type { GiftChain, GiftMail, GiftStep, GiftWords } from '#shared/giving/desk-schemas.ts';
import { WORDS_KIND_NOUNS } from '#shared/giving/desk-words.ts';
import { formatPence } from '#shared/money.ts';
import type { PaymentEvent } from './gift-payment-reads.ts';

type Told = Omit<GiftChain, 'steps' | 'history'>;

const EVENT_WORDS: Record<string, string> = {
  'checkout.session.completed': 'The card page was finished.',
  'checkout.session.async_payment_succeeded': 'The payment that was slow came through.',
  'checkout.session.async_payment_failed': 'The payment that was slow failed.',
  'checkout.session.expired': 'The card page ran out of time.',
  'payment_intent.created': 'The card service opened the payment.',
  'payment_intent.requires_action': 'The bank asked the giver to prove who they are.',
  'payment_intent.processing': 'The bank is still working on the payment.',
  'payment_intent.succeeded': 'The card service has the money.',
  'payment_intent.payment_failed': 'A try failed.',
  'payment_intent.canceled': 'The payment was called off.',
  'charge.succeeded': 'The card was charged.',
  'charge.failed': 'The bank refused the card.',
  'charge.updated': 'The card service told the fee.',
};

const STATE_WORDS: Record<PaymentEvent['state'], string> = {
  waiting: 'not worked yet',
  worked: 'worked',
  ignored: 'kept, nothing to do',
  refused: 'refused',
};

/** `insufficient_funds` as people say it. */
const plain = (code: string): string => code.replaceAll('_', ' ');

function eventStep(event: PaymentEvent): GiftStep {
  const words = EVENT_WORDS[event.type] ?? `The card service told: ${plain(event.type)}.`;
  const failed = /failed|canceled/.test(event.type);
  return {
    at: event.happened_at.toISOString(),
    kind: 'payment',
    words: failed && event.reason ? `${words} The bank said: ${plain(event.reason)}.` : words,
    detail: [
      `${event.id}, ${event.type}, of ${event.object_id}: ${STATE_WORDS[event.state]}`,
      ...(event.fault ? [event.fault] : []),
    ],
    isFault: failed || event.state === 'refused',
  };
}

const seenStep = (gift: Told, begunAt: Date): GiftStep => ({
  at: begunAt.toISOString(),
  kind: 'seen',
  words: `The giver read appeal wording ${gift.appeal.version} and asked to give ${formatPence(gift.sumPence)} for ${gift.towards}.`,
  detail: [
    `Card page ${gift.payment.sessionId}`,
    ...(gift.declaration ? [`Declared Gift Aid on declaration wording ${gift.declaration.version}`] : []),
    ...gift.consents.map(
      (one) =>
        `Consent wording ${one.version}: ${one.isGiven ? 'yes' : 'no'} to ${one.channel === 'email' ? 'e-mail' : one.channel === 'post' ? 'post' : 'telephone'}`,
    ),
  ],
  isFault: false,
});

const giftStep = (gift: Told): GiftStep => ({
  at: gift.receivedAt,
  kind: 'gift',
  words: `Gift ${gift.number}, ${formatPence(gift.sumPence)}, was recorded.`,
  detail: gift.shares.map(
    (share) =>
      `${formatPence(share.amountPence)} to ${share.name}, ${share.fund}${share.isMeant ? '' : ', because the part was paid for meanwhile'}`,
  ),
  isFault: false,
});

const ENTRY_WORDS: Record<string, string> = {
  received: 'The gift was posted in the books',
  'card-fee': 'The card fee was posted in the books',
};
const bookSteps = (gift: Told): GiftStep[] =>
  gift.entries.map((entry) => ({
    at: entry.recordedAt,
    kind: 'books',
    words: `${ENTRY_WORDS[entry.kind] ?? `Entry “${entry.kind}” was posted`}, dated ${formatDay(entry.day)}.`,
    detail: [],
    isFault: false,
  }));

function wordsSteps(words: GiftWords): GiftStep[] {
  const isWall = words.kind === 'wall-name';
  const what = WORDS_KIND_NOUNS[words.kind];
  const written: GiftStep = {
    at: words.writtenAt,
    kind: 'words',
    words: `The giver wrote ${isWall ? what : `a ${what}`}.`,
    detail: words.hasContact
      ? [
          `The family is to be told once the words are passed, ${words.mayTellSum ? 'with' : 'without'} the sum`,
        ]
      : [],
    isFault: false,
  };
  if (words.readAt === null) return [written];
  const it = isWall ? 'them' : 'it';
  const verdict = words.verdict === 'passed' ? `passed ${it}` : `held ${it} back`;
  return [
    written,
    {
      at: words.readAt,
      kind: 'words',
      words: `${words.readBy ?? 'Somebody'} read the ${what} and ${verdict}.`,
      detail: [],
      isFault: false,
    },
  ];
}

const MAIL_NAMES: Record<string, string> = { 'gift-thanks': 'thank-you' };
const mailName = (kind: string): string =>
  MAIL_NAMES[kind] ??
  (kind.startsWith('dedication') ? 'letter to the family' : plain(kind.replaceAll('-', ' ')));

function mailSteps(mail: GiftMail): GiftStep[] {
  const name = mailName(mail.kind);
  const steps: GiftStep[] = [
    {
      at: mail.createdAt,
      kind: 'mail',
      words: `The ${name} to ${mail.toName} was written.`,
      detail: [],
      isFault: false,
    },
  ];
  if (mail.sentAt)
    steps.push({
      at: mail.sentAt,
      kind: 'mail',
      words: `The ${name} was sent.`,
      detail: mail.answer ? [`The mail server said: ${mail.answer}`] : [],
      isFault: false,
    });
  return steps;
}

const RANK: Record<GiftStep['kind'], number> = { seen: 0, payment: 1, gift: 2, books: 3, words: 4, mail: 5 };

/** The card service tells whole seconds; what falls into one second is told in its natural order. */
const secondOf = (step: GiftStep): string => step.at.slice(0, 'YYYY-MM-DDTHH:mm:ss'.length);

export function tellSteps(gift: Told, begunAt: Date, events: readonly PaymentEvent[]): GiftStep[] {
  const steps = [
    seenStep(gift, begunAt),
    ...events.map(eventStep),
    giftStep(gift),
    ...bookSteps(gift),
    ...gift.words.flatMap(wordsSteps),
    ...gift.mails.flatMap(mailSteps),
  ];
  return steps.sort(
    (one, other) => secondOf(one).localeCompare(secondOf(other)) || RANK[one.kind] - RANK[other.kind],
  );
}
