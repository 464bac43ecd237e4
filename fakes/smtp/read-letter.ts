// Opens one kept letter: what it says, in both its forms, and every header line.
import { simpleParser } from 'mailparser';
import type { KeptLetter, LetterStore } from './letter-store.ts';

export type OpenLetter = KeptLetter & { plain: string; html: string; headers: string[] };

export const createReader =
  (store: LetterStore) =>
  async (id: string): Promise<OpenLetter | undefined> => {
    const kept = store.find(id);
    if (!kept) return undefined;
    // Links are made by the page that shows the text; pictures are left where they are.
    const letter = await simpleParser(await store.readSource(id), {
      skipTextToHtml: true,
      skipTextLinks: true,
      skipImageLinks: true,
    });
    return {
      ...kept,
      plain: letter.text ?? '',
      html: letter.html || '',
      headers: letter.headerLines.map((header) => header.line),
    };
  };
