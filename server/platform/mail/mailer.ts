// Hands one message to the mail server. One recipient a message, envelope set apart from what is shown.
import type { Readable } from 'node:stream';
import nodemailer from 'nodemailer';
import type { Config } from '../config.ts';
import { readFailure, type HandOverFailure } from './read-failure.ts';

export type Letter = {
  messageId: string;
  toName: string;
  toAddress: string;
  subject: string;
  html: string;
  plain: string;
};

export type HandOver = { kind: 'taken'; response: string } | HandOverFailure;

export type Mailer = {
  fromAddress: string;
  /** Resolves with what became of it; never rejects for anything that the mail server did. */
  send(letter: Letter, fromName: string): Promise<HandOver>;
  close(): void;
};

const CONNECT_TIMEOUT_MS = 10_000;
const SILENCE_TIMEOUT_MS = 60_000;
/** Shorter than the lease of a row being handed over, so that we know its fate before others doubt it. */
const HAND_OVER_TIMEOUT_MS = 100_000;

const transportOptions = (config: Config) => ({
  url: config.mail.smtpUrl,
  pool: true as const,
  maxConnections: 2,
  // The library would put a letter in its queue again when the line breaks. Whether to try again is decided
  // in the outbox alone, where it is written down.
  maxRequeues: 0,
  disableFileAccess: true,
  disableUrlAccess: true,
  connectionTimeout: CONNECT_TIMEOUT_MS,
  greetingTimeout: CONNECT_TIMEOUT_MS,
  dnsTimeout: CONNECT_TIMEOUT_MS,
  socketTimeout: SILENCE_TIMEOUT_MS,
});

export function createMailer(config: Config): Mailer {
  const transport = nodemailer.createTransport(transportOptions(config));
  /** The texts of letters under way: one that was never read from cannot have left for the server. */
  const texts = new Map<string, Readable>();
  transport.use('stream', (mail, next) => {
    const readText = mail.message.createReadStream.bind(mail.message);
    mail.message.createReadStream = (options) => {
      const text = readText(options);
      if (mail.data.messageId) texts.set(mail.data.messageId, text);
      return text;
    };
    next();
  });
  return {
    fromAddress: config.mail.from,
    async send(letter, fromName) {
      try {
        const info = await transport.sendMail({
          messageId: letter.messageId,
          from: { name: fromName, address: config.mail.from },
          to: { name: letter.toName, address: letter.toAddress },
          envelope: { from: config.mail.from, to: [letter.toAddress] },
          subject: letter.subject,
          html: letter.html,
          text: letter.plain,
          headers: { 'Auto-Submitted': 'auto-generated' },
          signal: AbortSignal.timeout(HAND_OVER_TIMEOUT_MS),
        });
        return { kind: 'taken', response: info.response };
      } catch (error) {
        return readFailure(error, texts.get(letter.messageId)?.readableDidRead ?? false);
      } finally {
        texts.delete(letter.messageId);
      }
    },
    close: () => transport.close(),
  };
}
