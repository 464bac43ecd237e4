// Seals the secrets of second factors, so that a copy of the database alone opens nothing.
import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';

const VERSION = 'v1';
const TAG_BYTES = 16;
const IV_BYTES = 12;

const keyOf = (sessionSecret: string): Buffer =>
  Buffer.from(hkdfSync('sha256', sessionSecret, 'treenail', 'second factor secrets', 32));

export function seal(sessionSecret: string, plain: string): string {
  const iv = randomBytes(IV_BYTES);
  const cipher = createCipheriv('aes-256-gcm', keyOf(sessionSecret), iv);
  const sealed = Buffer.concat([iv, cipher.update(plain, 'utf8'), cipher.final(), cipher.getAuthTag()]);
  return `${VERSION}.${sealed.toString('base64url')}`;
}

/** @throws when it was sealed with another secret, or altered. */
export function unseal(sessionSecret: string, text: string): string {
  const [version, body = ''] = text.split('.');
  const sealed = Buffer.from(body, 'base64url');
  if (version !== VERSION || sealed.length <= IV_BYTES + TAG_BYTES) throw new Error('not a sealed secret');
  const decipher = createDecipheriv('aes-256-gcm', keyOf(sessionSecret), sealed.subarray(0, IV_BYTES));
  decipher.setAuthTag(sealed.subarray(-TAG_BYTES));
  return decipher.update(sealed.subarray(IV_BYTES, -TAG_BYTES), undefined, 'utf8') + decipher.final('utf8');
}
