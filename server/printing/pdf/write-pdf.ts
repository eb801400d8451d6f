import { createWriteStream } from 'node:fs';
import { pipeline } from 'node:stream/promises';
import { drawAnnex } from './annex-pages.ts';
import { drawBriefPage, type BriefPage } from './brief-page.ts';
import { columnWidth, openSheet, page, trialSheet, type Sheet } from './sheet.ts';
import { printColours } from '../print-colours.ts';

export interface PdfPages {
  readonly pages: number;
  /** of these, the pages that the brief itself takes: one, unless its words are too many */
  readonly briefPages: number;
}

/** Writes a brief with its annex as a tagged PDF. The same brief makes the same bytes. */
export async function writePdf(path: string, brief: BriefPage): Promise<PdfPages> {
  const { text, facts } = brief;
  const sheet = openSheet({
    title: text.title,
    author: facts.teamName,
    subject: `Brief on ${facts.comparison.name}, ${facts.siteName}`,
    made: new Date(facts.madeAt),
  });
  const written = pipeline(sheet.doc, createWriteStream(path, { flags: 'wx' }));
  sheet.doc.outline.addItem('Brief');
  drawBriefPage(sheet, trialSheet(), brief);
  const briefPages = sheet.doc.bufferedPageRange().count;
  drawAnnex(sheet, facts);
  const pages = sheet.doc.bufferedPageRange().count;
  numberPages(sheet, brief, pages);
  sheet.end();
  await written;
  return { pages, briefPages };
}

function numberPages(sheet: Sheet, { facts, version }: BriefPage, pages: number): void {
  const y = page.height - page.margin * 0.75;
  const setting = { size: 8, colour: printColours['ink-2'], width: columnWidth / 2 };
  for (let i = 0; i < pages; i++) {
    sheet.doc.switchToPage(i);
    sheet.doc.markContent('Artifact', { type: 'Pagination', attached: ['Bottom'] });
    const mark = facts.invented ? ', invented place, people and data' : '';
    sheet.write(`Foothold, ${facts.siteName}, version ${version}${mark}`, page.margin, y, {
      ...setting,
      width: columnWidth * 0.8,
    });
    sheet.write(`${i + 1} of ${pages}`, page.margin + columnWidth / 2, y, { ...setting, align: 'right' });
    sheet.doc.endMarkedContent();
  }
}
