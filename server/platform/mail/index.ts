// What the rooms and the worker may use of the mail plumbing.
export { queueMail, type MailToQueue } from './outbox.ts';
export { sendDueMail, type MailDeps, type SendingInput, type SendingTally } from './send-due-mail.ts';
export { mailTasks } from './mail-tasks.ts';
export { settleMail, type MailDecision, type SettledMail } from './settle.ts';
export { listMailAbout, listOwedMail, type MailLine } from './reads.ts';
export { countDueMail, MAIL_STATES, mailStateSchema, type MailState } from './outbox-store.ts';
export { isPlainAddress } from './plain-address.ts';
export { renderLetter, type LetterParts } from './render-letter.ts';
export { html, type SafeHtml } from './letter-html.ts';
export { createMailer, type Mailer } from './mailer.ts';
