import type { Block } from '#contract/blocks.ts';
import type { BriefFacts } from '#contract/brief-content.ts';
import { curvesHeight, drawCurves } from './curves.ts';
import { columnWidth, page, pageEnd, type Sheet } from './sheet.ts';
import { drawTable } from './table.ts';
import { writeItem } from './words.ts';

const size = 9;
const sizes = { 1: 15, 2: 11 } as const;

/** The annex on pages of its own, each of its sections a bookmark. */
export function drawAnnex(sheet: Sheet, facts: BriefFacts): void {
  const { doc } = sheet;
  const { margin: x } = page;
  doc.addPage();
  const outline = doc.outline.addItem('Technical annex');
  let at: number = page.margin;
  sheet.tag('H1', () => {
    at = sheet.write('Technical annex', x, at, { size: 20, face: 'bold', width: columnWidth }) + 4;
  });
  const place = (y: number, height: number) => {
    if (y + height <= pageEnd) return y;
    doc.addPage();
    return page.margin;
  };
  const draw = (block: Block) => {
    switch (block.kind) {
      case 'heading': {
        const big = sizes[block.level];
        // A heading never stands alone at the foot of a page.
        at = place(at + big * 0.6, big * 5);
        if (block.level === 1) outline.addItem(block.text);
        sheet.tag(block.level === 1 ? 'H2' : 'H3', () => {
          at = sheet.write(block.text, x, at, { size: big, face: 'bold', width: columnWidth }) + 3;
        });
        return;
      }
      case 'text':
        at = place(at, sheet.heightOf(block.text, { size, width: columnWidth }));
        sheet.tag('P', () => {
          at = sheet.write(block.text, x, at, { size, width: columnWidth }) + 5;
        });
        return;
      case 'list':
        for (const item of block.items) {
          at = place(at, sheet.heightOf(item, { size, width: columnWidth - size }));
          at = writeItem(sheet, item, x, at, { size, width: columnWidth }) + 2;
        }
        at += 4;
        return;
      case 'table':
        at = drawTable(sheet, block, at + 3, { x, width: columnWidth, size: size * 0.9, place });
        return;
      case 'curves':
        at = place(at + 2, curvesHeight(facts));
        drawCurves(sheet, facts, block.outlook, x, at, columnWidth);
        at += curvesHeight(facts);
    }
  };
  for (const block of facts.annex) draw(block);
}
