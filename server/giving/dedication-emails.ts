// Tells one family contact of a gift in memory or in honour of somebody, after a person has read the words.
import { inSentence } from '#shared/campaign/name-rules.ts';
import { formatPence, type Pence } from '#shared/money.ts';
import type { Trx } from '#server/platform/db.ts';
import { queueMail, renderLetter } from '#server/platform/mail/index.ts';
import {
  dedicationPhrase,
  greetingLine,
  imprintValues,
  paragraphs,
  plainImprint,
  plainLetter,
  type Imprint,
} from './letter-words.ts';

export type DedicationNews = {
  kind: 'memory' | 'honour';
  honouredName: string;
  contactName: string;
  /** Null when the giver's name is withheld. */
  giverName: string | null;
  /** Null unless the giver said that the sum may be told. */
  sumPence: Pence | null;
  campaignName: string;
  society: Imprint & { contact: string };
};

function newsParagraphs(news: DedicationNews): string[] {
  const phrase = dedicationPhrase({ kind: news.kind, name: news.honouredName });
  const giver = news.giverName ?? 'Somebody who would rather not be named';
  return [
    `${giver} has made a gift${phrase} to ${inSentence(news.campaignName)}, which ${news.society.societyName} is building.`,
    ...(news.sumPence === null ? [] : [`The gift was ${formatPence(news.sumPence)}.`]),
    'The giver asked us to tell you. There is nothing that you need to do.',
    `We were given your name and your address for this letter, and use them for nothing else. If you have a question, answer this letter, or write to us or telephone: ${news.society.contact}.`,
  ];
}

export async function dedicationLetter(
  news: DedicationNews,
): Promise<{ subject: string; html: string; plain: string }> {
  const subject = `A gift${dedicationPhrase({ kind: news.kind, name: news.honouredName })}`;
  const greeting = greetingLine('', news.contactName);
  const words = newsParagraphs(news);
  const close = 'With our kind wishes,';
  const letter = await renderLetter({
    template: 'giving/dedication-told',
    values: {
      ...imprintValues(news.society),
      subject,
      preview: words[0] ?? subject,
      greeting,
      headline: subject,
      words: paragraphs(words),
      close,
    },
    plain: plainLetter([
      greeting,
      ...words,
      `${close}\n${news.society.societyName}`,
      plainImprint(news.society),
    ]),
  });
  return { subject, ...letter };
}

export type DedicationToQueue = DedicationNews & {
  giftId: string;
  contactEmail: string;
  siteUrl: string;
  at: Date;
};

/** Once a gift, however often the words are passed. */
export async function queueDedicationLetter(
  trx: Trx,
  { giftId, contactEmail, siteUrl, at, ...news }: DedicationToQueue,
): Promise<string | undefined> {
  const letter = await dedicationLetter(news);
  return queueMail(trx, {
    kind: 'dedication-told',
    subjectKind: 'gift',
    subjectId: giftId,
    toName: news.contactName,
    toAddress: contactEmail,
    siteUrl,
    at,
    ...letter,
  });
}
