// Hands one message to the mail server. One recipient a message, envelope set apart from what is shown.
import { Readable } from 'node:stream';
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

// A connection a letter: a pool sends a letter again by itself when its connection closes before the answer,
// and then one person may have it twice.
const transportOptions = (config: Config) => ({
  url: config.mail.smtpUrl,
  disableFileAccess: true,
  disableUrlAccess: true,
  connectionTimeout: CONNECT_TIMEOUT_MS,
  greetingTimeout: CONNECT_TIMEOUT_MS,
  dnsTimeout: CONNECT_TIMEOUT_MS,
  socketTimeout: SILENCE_TIMEOUT_MS,
});

/** Read only once the server has asked for the text, and says so then. */
async function* watched(text: Readable, onBegin: () => void): AsyncGenerator<Buffer> {
  onBegin();
  yield* text as AsyncIterable<Buffer>;
}

export function createMailer(config: Config): Mailer {
  return {
    fromAddress: config.mail.from,
    async send(letter, fromName) {
      let hasBegun = false;
      const transport = nodemailer.createTransport(transportOptions(config));
      transport.use('stream', (mail, next) => {
        const readText = mail.message.createReadStream.bind(mail.message);
        mail.message.createReadStream = (options) =>
          Readable.from(
            watched(readText(options), () => (hasBegun = true)),
            { objectMode: false },
          );
        next();
      });
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
        return readFailure(error, hasBegun);
      }
    },
    close: () => undefined,
  };
}
