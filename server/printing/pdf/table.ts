import type { Block } from '#contract/blocks.ts';
import { printColours } from '../print-colours.ts';
import type { Setting, Sheet } from './sheet.ts';

type Table = Extract<Block, { kind: 'table' }>;

export interface TableRoom {
  readonly x: number;
  readonly width: number;
  readonly size: number;
  /** makes room for a row: returns where it goes, which is the top of a new page where the old one is full */
  place(y: number, height: number): number;
}

const gap = 8;
const padding = 2.5;

/** Sets a table, its head again on every page that it runs on to; returns where it ends. */
export function drawTable(sheet: Sheet, table: Table, y: number, room: TableRoom): number {
  const widths = columnWidths(sheet, table, room);
  const { size, x, width } = room;
  const setting = (column: number, head: boolean): Setting => ({
    size: table.signs.includes(column) && !head ? size * 0.82 : size,
    face: head ? 'bold' : 'regular',
    width: widths[column],
    align: table.numbers.includes(column) ? 'right' : 'left',
  });
  const rowHeight = (cells: readonly string[], head: boolean) =>
    Math.max(...cells.map((cell, c) => sheet.heightOf(cell, setting(c, head)))) + 2 * padding;
  const drawRow = (cells: readonly string[], top: number, head: boolean) => {
    sheet.group('TR', () => {
      let left = x;
      cells.forEach((cell, c) => {
        const at = left;
        sheet.tag(head ? 'TH' : 'TD', () => {
          sheet.write(cell, at, top + padding, setting(c, head));
        });
        left += widths[c] + gap;
      });
    });
    const foot = top + rowHeight(cells, head);
    sheet.ornament(() => {
      sheet.doc
        .moveTo(x, foot)
        .lineTo(x + width, foot)
        .lineWidth(head ? 0.8 : 0.4)
        .stroke(head ? printColours.ink : printColours.rule);
    });
    return foot;
  };
  let at = y;
  if (table.caption) {
    const caption: Setting = { size, face: 'bold', width, colour: printColours['ink-2'] };
    const needed =
      sheet.heightOf(table.caption, caption) +
      rowHeight(table.head, true) +
      rowHeight(table.rows[0] ?? [''], false);
    at = room.place(at, needed);
    sheet.tag('Caption', () => {
      at = sheet.write(table.caption, x, at, caption) + 2;
    });
  }
  sheet.group('Table', () => {
    at = drawRow(table.head, at, true);
    for (const row of table.rows) {
      const height = rowHeight(row, false);
      const placed = room.place(at, height);
      at = placed === at ? at : drawRow(table.head, placed, true);
      at = drawRow(row, at, false);
    }
  });
  return at + size * 0.9;
}

/** Natural widths where they fit; else columns of words and long signs give way, the widest first. */
function columnWidths(sheet: Sheet, { head, rows, numbers }: Table, { width, size }: TableRoom): number[] {
  const room = width - gap * (head.length - 1);
  const natural = head.map((title, c) =>
    Math.max(
      sheet.widthOf(title, { size, face: 'bold' }),
      ...rows.map((row) => sheet.widthOf(row[c] ?? '', { size })),
    ),
  );
  // A hair more, so that rounding breaks no word.
  const widths = natural.map((w) => w + 1);
  const sum = () => widths.reduce((all, w) => all + w, 0);
  const least = (c: number) => (numbers.includes(c) ? Math.min(widths[c], 42) : 56);
  for (let step = 0; sum() > room && step < 2000; step++) {
    const widest = widths.reduce((best, w, c) => (w - least(c) > widths[best] - least(best) ? c : best), 0);
    if (widths[widest] <= least(widest)) break;
    widths[widest] -= Math.min(2, sum() - room);
  }
  // What is left over goes to the first column, so that rules and numbers end flush with the page.
  widths[0] += Math.max(0, room - sum());
  return widths;
}
