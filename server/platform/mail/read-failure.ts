// Tells from a failed hand-over whether the letter may be tried again, never will arrive, or may have arrived.
import { z } from 'zod';

export type HandOverFailure = {
  kind: 'soft' | 'hard' | 'uncertain';
  response: string;
  /** The fault lies with the mail server or our account there, so the next letter would meet it too. */
  isServerAway: boolean;
};

const faultSchema = z.object({
  message: z.string().default(''),
  code: z.string().optional(),
  command: z.string().optional(),
  responseCode: z.number().optional(),
  response: z.string().optional(),
});

/** Steps at which the server speaks about us and not about this letter's reader. */
const ABOUT_US = /^(CONN|EHLO|HELO|STARTTLS|AUTH|MAIL FROM|RSET|API)/;
const SERVICE_CLOSING = 421;

/**
 * `hasBegun`: whether any of the letter's text had left for the server. Without an answer after that, the
 * server may own the letter already, so only a person may decide to send it once more.
 */
export function readFailure(error: unknown, hasBegun: boolean): HandOverFailure {
  const fault = faultSchema.parse(error);
  const response = fault.response ?? fault.message;
  if (fault.responseCode === undefined) {
    // Written here and never offered to the server: nodemailer would not take the address.
    if (fault.code === 'EENVELOPE') return { kind: 'hard', response, isServerAway: false };
    return hasBegun
      ? { kind: 'uncertain', response, isServerAway: true }
      : { kind: 'soft', response, isServerAway: true };
  }
  const isAboutUs = fault.code === 'EAUTH' || ABOUT_US.test(fault.command ?? '');
  const isServerAway = isAboutUs || fault.responseCode === SERVICE_CLOSING;
  const isFinal = fault.responseCode >= 500 && !isAboutUs;
  return { kind: isFinal ? 'hard' : 'soft', response, isServerAway };
}
