// The receipt as a tagged PDF: it can be read aloud, printed on A4, and spells every name.
import { inSentence } from '#shared/campaign/name-rules.ts';
import PDFDocument from 'pdfkit';
import type { Receipt } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { dedicationPhrase } from './letter-words.ts';
import {
  addLedger,
  addRule,
  addText,
  ASH,
  LAMP,
  MARGIN,
  RULE,
  type LedgerRow,
  type Style,
} from './receipt-drawing.ts';
import { registerFonts } from './receipt-fonts.ts';

type Doc = PDFKit.PDFDocument;
type Element = PDFKit.PDFStructureElement;

function ledgerRows(receipt: Receipt): LedgerRow[] {
  const lines = receipt.shares.map(({ name, amountPence }): LedgerRow => ({
    name,
    sum: formatPence(amountPence),
    kind: 'line',
  }));
  const total: LedgerRow = { name: 'The gift', sum: formatPence(receipt.sumPence), kind: 'total' };
  return [{ name: 'Towards', sum: 'Sum', kind: 'head' }, ...lines, total];
}

function addGift(doc: Doc, root: Element, receipt: Receipt): void {
  addText(doc, root, 'P', receipt.societyName, { weight: 'bold', size: 12, after: 8 });
  addRule(doc, { colour: LAMP, weight: 3, after: 26 });
  addText(doc, root, 'H1', `Receipt ${receipt.number}`, { weight: 'bold', size: 26, after: 10 });
  const given = `${receipt.name} gave ${formatPence(receipt.sumPence)} to ${inSentence(receipt.campaignName)} on ${receipt.givenOn}`;
  const phrase = dedicationPhrase(receipt.dedication);
  addText(doc, root, 'P', phrase ? `${given},${phrase}.` : `${given}.`, { size: 13, after: 18 });
  addLedger(doc, root, ledgerRows(receipt));
  if (receipt.splitNote) addText(doc, root, 'P', receipt.splitNote);
  if (receipt.wallWords) addText(doc, root, 'P', `Words for the wall of names: “${receipt.wallWords}”`);
}

function addDeclaration(doc: Doc, root: Element, receipt: Receipt): void {
  const { declaration } = receipt;
  if (!declaration) return;
  doc.y += 8;
  addText(doc, root, 'H2', 'Gift Aid', { weight: 'bold', size: 15, after: 6 });
  addText(doc, root, 'P', `Declared on ${declaration.givenOn}, in these words:`);
  addText(doc, root, 'BlockQuote', declaration.wording, { indent: 18 });
  addText(doc, root, 'P', `Declared by ${declaration.name}, ${declaration.address}.`);
  addText(
    doc,
    root,
    'P',
    `Gift Aid adds ${formatPence(declaration.giftAidPence)} to this gift once it has been claimed.`,
  );
}

function addImprint(doc: Doc, root: Element, receipt: Receipt): void {
  const quiet: Style = { size: 10, colour: ASH, after: 4 };
  doc.y += 14;
  addRule(doc, { colour: RULE, weight: 0.75, after: 12 });
  addText(doc, root, 'P', `To change anything, write to us or telephone: ${receipt.contact}`, quiet);
  addText(doc, root, 'P', `${receipt.societyName}, ${receipt.societyAddress}`, quiet);
  addText(doc, root, 'P', receipt.registrationStatement, quiet);
  addText(doc, root, 'P', receipt.complaints, quiet);
}

async function collect(doc: Doc): Promise<Buffer> {
  const pieces: Buffer[] = [];
  for await (const piece of doc) if (Buffer.isBuffer(piece)) pieces.push(piece);
  return Buffer.concat(pieces);
}

export async function receiptPdf(receipt: Receipt): Promise<Buffer> {
  const doc = new PDFDocument({
    size: 'A4',
    margin: MARGIN,
    pdfVersion: '1.7',
    tagged: true,
    lang: 'en-GB',
    displayTitle: true,
    info: { Title: `Receipt ${receipt.number}, ${receipt.societyName}`, Author: receipt.societyName },
  });
  registerFonts(doc);
  const root = doc.struct('Document');
  doc.addStructure(root);
  addGift(doc, root, receipt);
  addDeclaration(doc, root, receipt);
  addImprint(doc, root, receipt);
  root.end();
  doc.end();
  return collect(doc);
}
