// The thank-you that every giver gets: what was given, towards what, and what was declared, in full.
import { inSentence } from '#shared/campaign/name-rules.ts';
import type { Receipt } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';
import type { Trx } from '#server/platform/db.ts';
import { html, queueMail, renderLetter, type SafeHtml } from '#server/platform/mail/index.ts';
import {
  dedicationPhrase,
  greetingLine,
  imprintValues,
  paragraphs,
  plainImprint,
  plainLetter,
  quoted,
} from './letter-words.ts';

export { dedicationLetter, queueDedicationLetter, type DedicationNews } from './dedication-emails.ts';

export type LetterAddresses = { receiptUrl: string; siteUrl: string };
export type WrittenLetter = { subject: string; html: string; plain: string };

function givenTable(receipt: Receipt): SafeHtml {
  const row = (name: string, sum: string): SafeHtml =>
    html`<tr>
      <th scope="row">${name}</th>
      <td>${sum}</td>
    </tr>`;
  const rows = receipt.shares.map((one) => row(one.name, formatPence(one.amountPence)));
  const total = html`<tfoot>
    ${row('Your gift', formatPence(receipt.sumPence))}
  </tfoot>`;
  return html`<table>
    <thead>
      <tr>
        <th scope="col">Towards</th>
        <th scope="col">Sum</th>
      </tr>
    </thead>
    <tbody>
      ${rows}
    </tbody>
    ${receipt.shares.length > 1 ? total : ''}
  </table>`;
}

const givenLines = (receipt: Receipt): string =>
  receipt.shares.map((one) => `Towards: ${one.name}, ${formatPence(one.amountPence)}`).join('\n');

function opening(receipt: Receipt): string {
  const gave = `You gave ${formatPence(receipt.sumPence)} to ${inSentence(receipt.campaignName)} on ${receipt.givenOn}.`;
  return receipt.dedication?.kind === 'memory'
    ? `${gave} We will use it with care.`
    : `${gave} One peg is nothing; hundreds hold up the whole frame. Thank you for yours.`;
}

const wallNote = (receipt: Receipt): string | null =>
  receipt.wallWords === null
    ? null
    : `For the wall of names you wrote: “${receipt.wallWords}”. One of us reads such words before anybody else sees them.`;

type Declaration = NonNullable<Receipt['declaration']>;

const declaredBy = (one: Declaration): string => `Declared by ${one.name}, ${one.address}.`;
const declaredWhen = (one: Declaration): string =>
  `Gift Aid: on ${one.givenOn} you declared, in these words:`;
const declaredWorth = (one: Declaration): string =>
  `Gift Aid adds ${formatPence(one.giftAidPence)} to this gift once we have claimed it. You may cancel the declaration at any time. Please tell us if your name or your home address changes, or if you no longer pay enough tax.`;

const declarationHtml = (one: Declaration | null): SafeHtml | string =>
  one
    ? html`<p>${declaredWhen(one)}</p>
        <blockquote>${one.wording}</blockquote>
        <p>${declaredBy(one)}</p>
        <p>${declaredWorth(one)}</p>`
    : '';

const declarationPlain = (one: Declaration | null): string | null =>
  one ? [declaredWhen(one), quoted(one.wording), declaredBy(one), declaredWorth(one)].join('\n\n') : null;

const changeNote = (receipt: Receipt): string =>
  `To change anything, your name, your address and your choices included, answer this letter, or write to us or telephone: ${receipt.contact}.`;

const receiptNote = (receipt: Receipt): string =>
  `Your receipt is number ${receipt.number}. You can read it, print it and keep it as a PDF here:`;

/** A letter about a gift in memory asks for nothing and points at nothing else. */
const lookNote = (receipt: Receipt): string | null =>
  receipt.dedication?.kind === 'memory' ? null : `How ${inSentence(receipt.campaignName)} stands today:`;

export async function thanksLetter(
  receipt: Receipt,
  { receiptUrl, siteUrl }: LetterAddresses,
): Promise<WrittenLetter> {
  const phrase = dedicationPhrase(receipt.dedication);
  const subject = `Thank you for your gift${phrase || ` to ${inSentence(receipt.campaignName)}`}`;
  const thanks = `Thank you for your gift${phrase}.`;
  const greeting = greetingLine(receipt.greeting, receipt.name);
  const notes = [receipt.splitNote, wallNote(receipt)].filter((note) => note !== null);
  const look = lookNote(receipt);
  const letter = await renderLetter({
    template: 'giving/gift-thanks',
    values: {
      ...imprintValues(receipt),
      subject,
      preview: `${formatPence(receipt.sumPence)} on ${receipt.givenOn}, receipt ${receipt.number}.`,
      greeting,
      thanks,
      opening: opening(receipt),
      given: givenTable(receipt),
      notes: paragraphs(notes),
      declaration: declarationHtml(receipt.declaration),
      receiptNote: receiptNote(receipt),
      receiptUrl,
      change: changeNote(receipt),
      look: look ? html`<p>${look} <a href="${siteUrl}" target="_blank">${siteUrl}</a></p>` : '',
    },
    plain: plainLetter([
      greeting,
      thanks,
      opening(receipt),
      givenLines(receipt),
      ...notes,
      declarationPlain(receipt.declaration),
      `${receiptNote(receipt)}\n${receiptUrl}`,
      changeNote(receipt),
      look && `${look} ${siteUrl}`,
      `With thanks,\n${receipt.societyName}`,
      plainImprint(receipt),
    ]),
  });
  return { subject, ...letter };
}

export type ThanksToQueue = LetterAddresses & {
  giftId: string;
  receipt: Receipt;
  toAddress: string;
  at: Date;
};

/** In the transaction of the gift. Asked for again, it does nothing: a gift is thanked for once. */
export async function queueThanks(trx: Trx, input: ThanksToQueue): Promise<string | undefined> {
  const letter = await thanksLetter(input.receipt, input);
  return queueMail(trx, {
    kind: 'gift-thanks',
    subjectKind: 'gift',
    subjectId: input.giftId,
    toName: input.receipt.name,
    toAddress: input.toAddress,
    siteUrl: input.siteUrl,
    at: input.at,
    ...letter,
  });
}
