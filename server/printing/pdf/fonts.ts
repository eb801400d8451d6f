import { createRequire } from 'node:module';
import type PDFDocument from 'pdfkit';

const require = createRequire(import.meta.url);
const family = '@expo-google-fonts/atkinson-hyperlegible-next';
const files = {
  regular: `${family}/400Regular/AtkinsonHyperlegibleNext_400Regular.ttf`,
  bold: `${family}/700Bold/AtkinsonHyperlegibleNext_700Bold.ttf`,
  // Greek, Cyrillic, arrows and signs that the family above lacks.
  otherRegular: 'dejavu-fonts-ttf/ttf/DejaVuSans.ttf',
  otherBold: 'dejavu-fonts-ttf/ttf/DejaVuSans-Bold.ttf',
} as const;
export type Face = 'regular' | 'bold';

/** Path of the typeface, for the document's first font. */
export const fontPath = (face: keyof typeof files): string => require.resolve(files[face]);

/** Part of a text that one font can show. */
export interface FontRun {
  readonly font: keyof typeof files;
  readonly text: string;
}

interface KnownGlyphs {
  hasGlyphForCodePoint(codePoint: number): boolean;
}

/** Registers the fonts and says in which of them each part of a text is to be set. */
export function registerFonts(doc: PDFKit.PDFDocument): (text: string, face: Face) => FontRun[] {
  for (const name of Object.keys(files) as (keyof typeof files)[]) doc.registerFont(name, fontPath(name));
  const glyphs = {} as Record<Face, KnownGlyphs>;
  for (const face of ['regular', 'bold'] as const) {
    doc.font(face);
    // pdfkit keeps its open font there; its types do not say so.
    glyphs[face] = (doc as unknown as { _font: { font: KnownGlyphs } })._font.font;
  }
  return (text, face) => {
    const other = face === 'bold' ? 'otherBold' : 'otherRegular';
    const runs: { font: keyof typeof files; text: string }[] = [];
    for (const sign of text) {
      const shown = sign === '\n' || glyphs[face].hasGlyphForCodePoint(sign.codePointAt(0)!);
      const font = shown ? face : other;
      const last = runs.at(-1);
      if (last?.font === font) last.text += sign;
      else runs.push({ font, text: sign });
    }
    return runs;
  };
}

export type PdfDocument = InstanceType<typeof PDFDocument>;
