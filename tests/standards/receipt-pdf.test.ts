// The receipt's PDF against ISO 32000-1 (14.8 tagged PDF, 14.9 natural language), read by a reader that is not ours.
import { readFileSync } from 'node:fs';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { receiptPdf } from '#server/giving/receipt-pdf.ts';
import { receiptSchema, type Receipt } from '#shared/giving/give-schemas.ts';

const { receipt } = z
  .object({ receipt: receiptSchema })
  .parse(
    JSON.parse(readFileSync(new URL('../../emails/giving/gift-thanks.sample.json', import.meta.url), 'utf8')),
  );

type Node = { role: string; children: Node[] };
const nodeSchema: z.ZodType<Node> = z.object({
  role: z.string().default('content'),
  get children() {
    return z.array(nodeSchema).default([]);
  },
});

async function open(changes: Partial<Receipt> = {}) {
  const pdf = await receiptPdf({ ...receipt, ...changes });
  const doc = await getDocument({ data: new Uint8Array(pdf), useSystemFonts: false, verbosity: 0 }).promise;
  const info = z
    .object({ Language: z.string(), Title: z.string(), PDFFormatVersion: z.string() })
    .parse((await doc.getMetadata()).info);
  const pages = await Promise.all(Array.from({ length: doc.numPages }, (_, index) => doc.getPage(index + 1)));
  const contents = await Promise.all(pages.map((page) => page.getTextContent()));
  const text = contents
    .flatMap((content) => content.items)
    .map((item) => ('str' in item ? item.str + (item.hasEOL ? ' ' : '') : ''))
    .join('')
    .replaceAll(/\s+/g, ' ');
  const tree = nodeSchema.parse(await pages[0]?.getStructTree());
  const opened = { pdf, info, text, tree, marks: await doc.getMarkInfo(), pages: doc.numPages };
  await doc.destroy();
  return opened;
}

const rolesOf = (node: Node): string[] => [node.role, ...node.children.flatMap(rolesOf)];
const find = (node: Node, role: string): Node[] => [
  ...(node.role === role ? [node] : []),
  ...node.children.flatMap((child) => find(child, role)),
];

describe('the receipt as a PDF', () => {
  let opened: Awaited<ReturnType<typeof open>>;
  beforeAll(async () => {
    opened = await open();
  });

  it('says its language, its title, and that it is tagged', () => {
    expect(opened.info).toEqual({
      Language: 'en-GB',
      Title: 'Receipt 00611, Brackenhythe Heritage Society',
      PDFFormatVersion: '1.7',
    });
    expect(opened.marks).toMatchObject({ Marked: true });
  });

  it('shows its title in place of the file’s name', () => {
    expect(opened.pdf.toString('latin1')).toMatch(/\/DisplayDocTitle true/);
  });

  it('has one first heading, paragraphs, and a table of rows with their headings', () => {
    expect(rolesOf(opened.tree).filter((role) => role === 'H1')).toHaveLength(1);
    expect(rolesOf(opened.tree)).toEqual(expect.arrayContaining(['Document', 'H2', 'P', 'BlockQuote']));
    const [table, ...more] = find(opened.tree, 'Table');
    expect(more).toHaveLength(0);
    const rows = table?.children.map((row) => row.children.map((cell) => cell.role));
    expect(rows).toEqual([
      ['TH', 'TH'],
      ['TH', 'TD'],
      ['TH', 'TD'],
      ['TH', 'TD'],
    ]);
  });

  it('tells all of the gift and the declaration, word for word', () => {
    for (const words of [
      'Receipt 00611',
      'Thea Quillan gave £60 to the Lampwoman on 3 May 2027, in memory of Walter Quillan.',
      'Head and scarf',
      receipt.splitNote ?? '',
      receipt.declaration?.wording ?? '',
      'Declared by Thea Quillan, 9 Ropewalk, Brackenhythe, BK4 7HY.',
      receipt.registrationStatement,
      receipt.complaints,
      receipt.contact,
    ])
      expect(opened.text).toContain(words);
  });

  it.each([
    'Wojciech Żółć z Łodzi',
    "Niamh Ó'Hara",
    'Zoë Müller-Straße',
    'Ελένη Παπαδοπούλου',
    'Олена Їжак',
    'Ağaoğlu Şükrü',
  ])('spells %s right', async (name) => {
    expect((await open({ name })).text).toContain(`${name} gave £60`);
  });

  it('spells a name written in pieces as one that is whole', async () => {
    expect((await open({ name: 'Łódź'.normalize('NFD') })).text).toContain('Łódź gave');
  });

  it('goes on to a second page when the words are many, and loses none', async () => {
    const wording = Array.from({ length: 400 }, (_, index) => `word${index}`).join(' ');
    const declaration = receipt.declaration
      ? { ...receipt.declaration, wording: `${wording} ${wording} ${wording}` }
      : null;
    const long = await open({ declaration });
    expect(long.pages).toBeGreaterThan(1);
    expect(long.text).toContain('word399');
    expect(long.text).toContain(receipt.complaints);
  });
});
