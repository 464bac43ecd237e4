// How a receipt is drawn: paragraphs, rules and the table of shares, each with its place in the PDF's structure.
import { toRuns, type Weight } from './receipt-fonts.ts';

export const INK = '#1B2426';
export const ASH = '#5A6462';
export const RULE = '#CFC6B2';
export const LAMP = '#D98A00';
export const MARGIN = 64;

type Doc = PDFKit.PDFDocument;
type Element = PDFKit.PDFStructureElement;
export type Style = { size?: number; weight?: Weight; colour?: string; indent?: number; after?: number };
type Box = { x: number; width: number; align?: 'right' };

const SIZE = 11.5;
const LINE_GAP = 0.3;
/** From the top of a line to the feet of its letters, so that faces of different build stand on one line. */
const RISE = 1;

/** Writes a text in place, changing face wherever a letter needs it. */
function writeRuns(
  doc: Doc,
  text: string,
  box: Box,
  { size = SIZE, weight = 'plain', colour = INK }: Style,
): void {
  const runs = toRuns(doc, text, weight);
  const rise = size * RISE;
  runs.forEach((run, index) => {
    const options = {
      width: box.width,
      lineGap: size * LINE_GAP,
      baseline: 'alphabetic' as const,
      continued: index < runs.length - 1,
      ...(box.align && { align: box.align }),
    };
    doc.font(run.font).fontSize(size).fillColor(colour);
    if (index === 0) doc.text(run.text, box.x, doc.y + rise, options);
    else doc.text(run.text, options);
  });
  doc.y -= rise;
}

const pageBox = (doc: Doc, indent = 0): Box => ({
  x: MARGIN + indent,
  width: doc.page.width - 2 * MARGIN - indent,
});

export function addText(doc: Doc, parent: Element, tag: string, text: string, style: Style = {}): void {
  parent.add(doc.struct(tag, {}, () => writeRuns(doc, text, pageBox(doc, style.indent), style)));
  doc.y += style.after ?? 9;
}

/** A drawn line says nothing, so a reader aloud passes over it. */
export function addRule(
  doc: Doc,
  { colour, weight, after }: { colour: string; weight: number; after: number },
): void {
  doc.markContent('Artifact', { type: 'Layout' });
  doc
    .moveTo(MARGIN, doc.y)
    .lineTo(doc.page.width - MARGIN, doc.y)
    .lineWidth(weight)
    .strokeColor(colour)
    .stroke();
  doc.endMarkedContent();
  doc.y += after;
}

export type LedgerRow = { name: string; sum: string; kind: 'head' | 'line' | 'total' };

const SUM_WIDTH = 110;
const HEAD_SCOPE = { head: 'Column', line: 'Row', total: 'Row' } as const;

/** `scope` is understood by the library though its types do not know it. */
const heading = (kind: LedgerRow['kind']) => ({ lang: 'en-GB', scope: HEAD_SCOPE[kind] });

function addRow(doc: Doc, table: Element, { name, sum, kind }: LedgerRow): void {
  const style: Style = { weight: kind === 'line' ? 'plain' : 'bold', size: kind === 'head' ? 10 : SIZE };
  const nameBox = { x: MARGIN, width: pageBox(doc).width - SUM_WIDTH };
  const sumBox: Box = { x: MARGIN + nameBox.width, width: SUM_WIDTH, align: 'right' };
  const top = doc.y;
  let bottom = top;
  const write = (text: string, box: Box) => () => {
    doc.y = top;
    writeRuns(doc, text, box, style);
    bottom = Math.max(bottom, doc.y);
  };
  const row = doc.struct('TR');
  table.add(row);
  row.add(doc.struct('TH', heading(kind), write(name, nameBox)));
  row.add(
    kind === 'head'
      ? doc.struct('TH', heading(kind), write(sum, sumBox))
      : doc.struct('TD', {}, write(sum, sumBox)),
  );
  row.end();
  doc.y = bottom + 5;
}

/** A ruled ledger: hairlines between the rows, the total ruled twice. */
export function addLedger(doc: Doc, parent: Element, rows: readonly LedgerRow[]): void {
  const table = doc.struct('Table');
  parent.add(table);
  for (const row of rows) {
    addRow(doc, table, row);
    const weight = 0.75;
    if (row.kind === 'line') addRule(doc, { colour: RULE, weight, after: 6 });
    else addRule(doc, { colour: INK, weight, after: row.kind === 'head' ? 6 : 2 });
    if (row.kind === 'total') addRule(doc, { colour: INK, weight, after: 6 });
  }
  table.end();
  doc.y += 10;
}
