// The test cards that the card page offers, and the fate of each.

export type Refusal = { code: string; declineCode: string; message: string; reason: string };
export type TestCard = {
  number: string;
  label: string;
  fate: 'paid' | 'refused' | 'asks' | 'slow';
  refusal?: Refusal;
};

const refused = (number: string, label: string, refusal: Refusal): TestCard => ({
  number,
  label,
  fate: 'refused',
  refusal,
});

/** A refused card's message is what the service tells its caller; its reason is what the page tells the payer. */
export const TEST_CARDS: readonly TestCard[] = [
  { number: '4242424242424242', label: 'Pays at once', fate: 'paid' },
  { number: '4000002500003155', label: 'Asks you to confirm it is you', fate: 'asks' },
  { number: '4000009900000012', label: 'Pays, but is confirmed some seconds later', fate: 'slow' },
  refused('4000000000000002', 'Refused without a reason', {
    code: 'card_declined',
    declineCode: 'generic_decline',
    message: 'Your card was declined.',
    reason: 'The bank refused this card and gave no reason.',
  }),
  refused('4000000000009995', 'Refused: too little money', {
    code: 'card_declined',
    declineCode: 'insufficient_funds',
    message: 'Your card has insufficient funds.',
    reason: 'The bank refused this card: there is too little money in the account.',
  }),
  refused('4000000000000069', 'Refused: out of date', {
    code: 'expired_card',
    declineCode: 'expired_card',
    message: 'Your card has expired.',
    reason: 'The bank refused this card: it is out of date.',
  }),
  refused('4000000000009987', 'Refused: reported lost', {
    code: 'card_declined',
    declineCode: 'lost_card',
    message: 'Your card was declined.',
    reason: 'The bank refused this card: it has been reported lost.',
  }),
];

export const NOT_CONFIRMED: Refusal = {
  code: 'payment_intent_authentication_failure',
  declineCode: 'authentication_required',
  message:
    'We are unable to authenticate your payment method. Please choose a different payment method and try again.',
  reason: 'You did not confirm that it is you, so nothing was paid.',
};

export const SLOW_REFUSAL: Refusal = {
  code: 'card_declined',
  declineCode: 'generic_decline',
  message: 'Your card was declined.',
  reason: 'The bank did not confirm the payment.',
};

const digitsOf = (text: string): string => text.replace(/[\s-]/g, '');

export const findCard = (number: string): TestCard | undefined =>
  TEST_CARDS.find((card) => card.number === digitsOf(number));

/** What to tell the payer about a refusal that an object carries. */
export const reasonOf = (code: string | undefined, declineCode: string | undefined): string =>
  (code === NOT_CONFIRMED.code
    ? NOT_CONFIRMED.reason
    : TEST_CARDS.find((card) => card.refusal?.declineCode === declineCode)?.refusal?.reason) ??
  SLOW_REFUSAL.reason;
