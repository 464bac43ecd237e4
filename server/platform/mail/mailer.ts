// Hands one message to the mail server. One recipient a message, envelope set apart from what is shown.
import nodemailer from 'nodemailer';
import type { Config } from '../config.ts';

export type Letter = {
  messageId: string;
  toName: string;
  toAddress: string;
  subject: string;
  html: string;
  plain: string;
};

export type Mailer = {
  fromAddress: string;
  /** Resolves with the server's words once it has taken the message; rejects with nodemailer's error. */
  send(letter: Letter, fromName: string): Promise<string>;
  close(): void;
};

export function createMailer(config: Config): Mailer {
  const transport = nodemailer.createTransport({
    url: config.mail.smtpUrl,
    pool: true,
    maxConnections: 2,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    fromAddress: config.mail.from,
    async send(letter, fromName) {
      const info = await transport.sendMail({
        messageId: letter.messageId,
        from: { name: fromName, address: config.mail.from },
        to: { name: letter.toName, address: letter.toAddress },
        envelope: { from: config.mail.from, to: [letter.toAddress] },
        subject: letter.subject,
        html: letter.html,
        text: letter.plain,
        headers: { 'Auto-Submitted': 'auto-generated' },
      });
      return info.response;
    },
    close: () => transport.close(),
  };
}
