import PDFDocument from 'pdfkit';
import { printColours } from '../print-colours.ts';
import { fontPath, registerFonts, type Face } from './fonts.ts';

export interface Setting {
  readonly size: number;
  readonly face?: Face;
  readonly colour?: string;
  readonly width: number;
  readonly align?: 'left' | 'right';
}

/** A4, in points. */
export const page = { width: 595.28, height: 841.89, margin: 42, foot: 44 } as const;
export const columnWidth = page.width - 2 * page.margin;
export const pageEnd = page.height - page.margin - page.foot / 2;

/**
 * What pages are drawn on: a PDF with tags, or a trial sheet without end on which the same code shows how much room it
 * takes. Positions are in points from the top left.
 */
export interface Sheet {
  readonly doc: PDFKit.PDFDocument;
  readonly trial: boolean;
  /** Sets a text and returns where it ends, y. */
  write(text: string, x: number, y: number, setting: Setting): number;
  heightOf(text: string, setting: Setting): number;
  widthOf(text: string, setting: Pick<Setting, 'size' | 'face'>): number;
  /** Draws something that readers are told of as `kind`, e.g. `P`, `H2`, `TD`; a `Figure` needs `alt`. */
  tag(kind: string, draw: () => void, alt?: string): void;
  /** Holds what is tagged within. */
  group(kind: string, draw: () => void): void;
  /** Draws something that readers are not told of: rules and ornaments. */
  ornament(draw: () => void): void;
}

export interface DocumentFacts {
  readonly title: string;
  readonly author: string;
  readonly subject: string;
  readonly made: Date;
}

/** A tagged PDF 1.7 with all its pages open until the end, so that they can be numbered. */
export function openSheet({ title, author, subject, made }: DocumentFacts): Sheet & { end(): void } {
  const doc = new PDFDocument({
    size: 'A4',
    margin: 0,
    bufferPages: true,
    pdfVersion: '1.7',
    // pdfkit's types lag behind its subsets.
    subset: 'PDF/UA' as 'PDF/A-2a',
    tagged: true,
    lang: 'en-GB',
    displayTitle: true,
    font: fontPath('regular'),
    info: { Title: title, Author: author, Subject: subject, Creator: 'Foothold', CreationDate: made },
  });
  const root = doc.struct('Document');
  doc.addStructure(root);
  const parents = [root];
  const sheet = sheetOn(doc, false);
  return {
    ...sheet,
    tag(kind, draw, alt) {
      parents.at(-1)!.add(doc.struct(kind, alt === undefined ? {} : { alt }, draw));
    },
    group(kind, draw) {
      const element = doc.struct(kind);
      parents.at(-1)!.add(element);
      parents.push(element);
      draw();
      parents.pop();
      element.end();
    },
    ornament(draw) {
      doc.markContent('Artifact', { type: 'Layout' });
      draw();
      doc.endMarkedContent();
    },
    end() {
      root.end();
      doc.end();
    },
  };
}

/** A sheet to measure on; nothing comes of it. */
export function trialSheet(): Sheet {
  const doc = new PDFDocument({ size: [page.width, 14_000], margin: 0, font: fontPath('regular') });
  const plain = (_: string, draw: () => void) => draw();
  return { ...sheetOn(doc, true), tag: plain, group: plain, ornament: (draw) => draw() };
}

function sheetOn(
  doc: PDFKit.PDFDocument,
  trial: boolean,
): Pick<Sheet, 'doc' | 'trial' | 'write' | 'heightOf' | 'widthOf'> {
  const runsOf = registerFonts(doc);
  const lineGap = (size: number) => size * 0.12;
  const heightOf: Sheet['heightOf'] = (text, { size, face = 'regular', width }) =>
    doc
      .font(face)
      .fontSize(size)
      .heightOfString(text, { width, lineGap: lineGap(size) });
  const widthOf: Sheet['widthOf'] = (text, { size, face = 'regular' }) =>
    runsOf(text, face).reduce(
      (sum, run) => sum + doc.font(run.font).fontSize(size).widthOfString(run.text),
      0,
    );
  return {
    doc,
    trial,
    heightOf,
    widthOf,
    write(text, x, y, setting) {
      const { size, face = 'regular', colour = printColours.ink, width, align = 'left' } = setting;
      const runs = runsOf(text, face);
      doc.fillColor(colour);
      const options = { width, lineGap: lineGap(size) };
      if (runs.length < 2) {
        doc
          .font(runs[0]?.font ?? face)
          .fontSize(size)
          .text(text, x, y, { ...options, align });
      } else {
        // Runs that follow each other know no alignment, so what stands to the right is set from where it must begin.
        const left = align === 'right' ? x + Math.max(0, width - widthOf(text, setting)) : x;
        runs.forEach((run, i) => {
          doc.font(run.font).fontSize(size);
          const more = { ...options, width: width - (left - x), continued: i < runs.length - 1 };
          if (i === 0) doc.text(run.text, left, y, more);
          else doc.text(run.text, more);
        });
      }
      return y + heightOf(text, setting);
    },
  };
}
