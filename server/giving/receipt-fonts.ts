// Fonts of the receipt, and which of them can spell what: Lora first, then faces with more of the world's letters.
import { createRequire } from 'node:module';

const { resolve } = createRequire(import.meta.url);
const lora = (file: string): string => resolve(`@expo-google-fonts/lora/${file}`);
const dejaVu = (file: string): string => resolve(`dejavu-fonts-ttf/ttf/${file}`);

export type Weight = 'plain' | 'bold';

/** In the order in which they are asked. */
const FACES: Record<Weight, readonly { name: string; path: string }[]> = {
  plain: [
    { name: 'lora', path: lora('400Regular/Lora_400Regular.ttf') },
    { name: 'serif', path: dejaVu('DejaVuSerif.ttf') },
    { name: 'sans', path: dejaVu('DejaVuSans.ttf') },
  ],
  bold: [
    { name: 'lora-bold', path: lora('600SemiBold/Lora_600SemiBold.ttf') },
    { name: 'serif-bold', path: dejaVu('DejaVuSerif-Bold.ttf') },
    { name: 'sans-bold', path: dejaVu('DejaVuSans-Bold.ttf') },
  ],
};

export function registerFonts(doc: PDFKit.PDFDocument): void {
  for (const { name, path } of [...FACES.plain, ...FACES.bold]) doc.registerFont(name, path);
}

type GlyphFont = { hasGlyphForCodePoint(codePoint: number): boolean };

const hasGlyphs = (font: unknown): font is GlyphFont =>
  typeof font === 'object' && font !== null && 'hasGlyphForCodePoint' in font;

/** The library tells a font's letters only through its own field; should that go, this says so at once. */
function glyphsOf(doc: PDFKit.PDFDocument, name: string): GlyphFont {
  const inside: object = doc.font(name);
  const held: unknown = '_font' in inside ? inside._font : undefined;
  const font: unknown = typeof held === 'object' && held !== null && 'font' in held ? held.font : undefined;
  if (!hasGlyphs(font)) throw new TypeError('the PDF library no longer tells which letters a font has');
  return font;
}

/** Marks that join to the letter before them stay in its face. */
const JOINS = /^(\p{M}|\u200d)$/u;

export type Run = { font: string; text: string };

/** Cuts a text into runs, each in the first face that has its letters. A face is opened only when it is needed. */
export function toRuns(doc: PDFKit.PDFDocument, text: string, weight: Weight = 'plain'): Run[] {
  const faces = FACES[weight];
  const runs: Run[] = [];
  for (const letter of text.normalize('NFC')) {
    const code = letter.codePointAt(0) ?? 0;
    const last = runs.at(-1);
    const found =
      last && JOINS.test(letter)
        ? last.font
        : faces.find(({ name }) => glyphsOf(doc, name).hasGlyphForCodePoint(code))?.name;
    const font = found ?? faces[0]?.name ?? '';
    if (last?.font === font) last.text += letter;
    else runs.push({ font, text: letter });
  }
  return runs;
}
