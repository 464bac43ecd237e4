// Reads what was typed on the card page.
import { z } from 'zod';
import { now } from '../state/clock.ts';
import type { Service } from '../service.ts';
import { TEST_CARDS, findCard } from '../test-cards.ts';
import type { TestCard } from '../test-cards.ts';
import type { CardFaults } from './CardFields.tsx';

const formSchema = z.object({
  card: z.string().max(40).default(''),
  number: z.string().max(40).default(''),
  expiry: z.string().max(20).default(''),
  code: z.string().max(10).default(''),
});
type Form = z.infer<typeof formSchema>;
export type CardForm = { card: TestCard | undefined; form: Form; faults: CardFaults };

export const FIRST_CARD = TEST_CARDS[0]?.number ?? '';

/** What the fields hold before anything is typed: any later month does, so a good one is written already. */
export const startForm = (service: Service): Form => ({
  card: FIRST_CARD,
  number: '',
  expiry: `12 / ${String(now(service).getUTCFullYear() + 4).slice(-2)}`,
  code: '123',
});

function expiryFault(service: Service, text: string): string | undefined {
  const [, month = '', year = ''] = /^\s*(\d{1,2})\s*[/ -]?\s*(?:20)?(\d{2})\s*$/.exec(text) ?? [];
  if (Number(month) < 1 || Number(month) > 12) return 'Write the expiry as month and year, such as 12 / 30';
  const firstDayAfter = Date.UTC(2000 + Number(year), Number(month), 1);
  return firstDayAfter <= now(service).getTime()
    ? 'This expiry has passed: any later month will do'
    : undefined;
}

export function readCardForm(service: Service, body: unknown): CardForm {
  const form = formSchema.catch(startForm(service)).parse(body ?? {});
  // A number that was typed says more than a choice that stood there already.
  const card = findCard(form.number.trim() === '' ? form.card : form.number);
  const expiry = expiryFault(service, form.expiry);
  const faults: CardFaults = {
    ...(!card && { number: 'This is not one of the test cards. Choose one of those listed' }),
    ...(expiry && { expiry }),
    ...(!/^\s*\d{3}\s*$/.test(form.code) && { code: 'Write three digits for the security code' }),
  };
  return { card, form, faults };
}
