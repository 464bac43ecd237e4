// Makes ids that look as the service's do: a prefix that says what the thing is, then letters and digits.
import { randomBytes } from 'node:crypto';

function randomText(length: number): string {
  let text = '';
  while (text.length < length)
    text += randomBytes(length)
      .toString('base64')
      .replace(/[^A-Za-z0-9]/g, '');
  return text.slice(0, length);
}

const LENGTHS = {
  cs_test: 58,
  pi: 24,
  ch: 24,
  txn: 24,
  evt: 24,
  li: 24,
  price: 24,
  prod: 14,
  pm: 24,
  req: 14,
} as const;

/** Random, so that no id is ever used twice, a restart or a lost state folder included. */
export const newId = (prefix: keyof typeof LENGTHS): string => `${prefix}_${randomText(LENGTHS[prefix])}`;

export const newSecret = (id: string): string => `${id}_secret_${randomText(25)}`;
