import { wideParts, type BriefFacts, type BriefPartText, type BriefText } from '#contract/brief-content.ts';
import { formatMoney } from '#contract/format-money.ts';
import { formatDate } from '#contract/formats.ts';
import { of100 } from '#sim-core/compare/chance-words.ts';
import { printColours } from '../print-colours.ts';
import { drawRules } from './hundred-rules.ts';
import { columnWidth, page, pageEnd, type Sheet } from './sheet.ts';
import { drawMaps } from './small-maps.ts';
import { drawTable } from './table.ts';
import { writeItem, writeWords } from './words.ts';

export interface BriefPage {
  readonly text: BriefText;
  readonly facts: BriefFacts;
  readonly version: number;
  /** the maps as PNG files, by option */
  readonly maps: readonly (string | undefined)[];
}

/** Sizes of type that are tried, largest first, until the page holds all; points. */
const sizes = [11.2, 10.6, 10, 9.4, 8.8, 8.2, 7.6];
const columnGap = 22;
const partGap = 0.9;

/** The page for people who decide. Where not even the smallest type brings it onto one page, it runs on to another. */
export function drawBriefPage(sheet: Sheet, trial: Sheet, brief: BriefPage): void {
  // Smaller type never takes more room, so halving the list finds the largest that fits.
  let [fits, tooLarge] = [sizes.length - 1, -1];
  while (fits - tooLarge > 1) {
    const middle = (fits + tooLarge) >> 1;
    if (drawAll(trial, brief, sizes[middle], false) <= pageEnd) fits = middle;
    else tooLarge = middle;
  }
  drawAll(sheet, brief, sizes[fits], true, trial);
}

/** Parts side by side: one that takes the whole width, or one or two that follow each other. */
export function rowsOf(parts: readonly BriefPartText[]): BriefPartText[][] {
  const rows: BriefPartText[][] = [];
  for (const part of parts.filter(({ shown }) => shown)) {
    const last = rows.at(-1);
    const open = last?.length === 1 && !wideParts.includes(last[0].part) && !wideParts.includes(part.part);
    if (open) last.push(part);
    else rows.push([part]);
  }
  return rows;
}

/** Draws the page and returns where it ends, y. Page breaks are made on the real sheet alone. */
function drawAll(sheet: Sheet, brief: BriefPage, size: number, breaks: boolean, trial?: Sheet): number {
  let at = drawHead(sheet, brief, size);
  for (const row of rowsOf(brief.text.parts)) {
    const width = row.length === 1 ? columnWidth : (columnWidth - columnGap) / 2;
    const draw = (on: Sheet, y: number) =>
      Math.max(
        ...row.map((part, i) =>
          drawPart(on, brief, part, page.margin + i * (width + columnGap), y, width, size),
        ),
      );
    if (breaks && trial && at > page.margin && draw(trial, at) > pageEnd) {
      sheet.doc.addPage();
      at = page.margin;
    }
    at = draw(sheet, at) + size * partGap;
  }
  return at;
}

function drawHead(sheet: Sheet, { text, facts, version }: BriefPage, size: number): number {
  const { margin } = page;
  const small = { size: size * 0.9, colour: printColours['ink-2'], width: columnWidth / 2 };
  sheet.tag('P', () => {
    sheet.write(facts.teamName, margin, margin, small);
  });
  sheet.tag('P', () => {
    sheet.write(`Brief, version ${version}, ${formatDate(facts.madeAt)}`, margin + columnWidth / 2, margin, {
      ...small,
      align: 'right',
    });
  });
  let at = margin + size * 1.7;
  sheet.tag('H1', () => {
    at = sheet.write(text.title, margin, at, { size: size * 2, face: 'bold', width: columnWidth });
  });
  if (facts.invented)
    sheet.tag('P', () => {
      at = sheet.write('Invented place, people and data', margin, at + 1, { ...small, width: columnWidth });
    });
  return at + size * 0.7;
}

function drawPart(
  sheet: Sheet,
  brief: BriefPage,
  part: BriefPartText,
  x: number,
  y: number,
  width: number,
  size: number,
): number {
  const { facts } = brief;
  let at = y;
  sheet.group('Sect', () => {
    sheet.ornament(() => {
      sheet.doc
        .moveTo(x, y)
        .lineTo(x + width, y)
        .lineWidth(0.7)
        .stroke(printColours.ink);
    });
    sheet.tag('H2', () => {
      at =
        sheet.write(part.heading, x, y + size * 0.35, { size: size * 1.05, face: 'bold', width }) +
        size * 0.15;
    });
    const words = (left: number, top: number, room: number, bigger = 1) =>
      writeWords(sheet, part.words, left, top, { size: size * bigger, width: room });
    switch (part.part) {
      case 'answer':
        at = drawAnswer(sheet, facts, part, x, at, width, size);
        break;
      case 'maps':
        at = drawMaps(sheet, facts, brief.maps, x, words(x, at, width), width, size * 0.9);
        break;
      case 'cost':
        at = drawCosts(sheet, facts, x, words(x, at, width), width, size);
        break;
      case 'decision':
        at = drawDecision(sheet, facts, x, words(x, at, width), width, size);
        break;
      case 'cautions':
        at = words(x, at, width);
        for (const caution of facts.cautions)
          at =
            writeItem(sheet, caution, x, at, { size: size * 0.95, width, colour: printColours['ink-2'] }) + 1;
        break;
      default:
        at = words(x, at, width);
    }
  });
  return at;
}

/** The chance in large figures, the sentence beside it, and the rules of 100 below. */
function drawAnswer(
  sheet: Sheet,
  facts: BriefFacts,
  part: BriefPartText,
  x: number,
  y: number,
  width: number,
  size: number,
): number {
  const figure = String(of100(facts.outlooks[0].options[facts.lead].chance.estimate));
  const big = { size: size * 4.2, face: 'bold' as const };
  const room = sheet.widthOf(figure, big) + size;
  sheet.tag('P', () => {
    sheet.write(figure, x, y - size * 0.4, { ...big, width: room });
  });
  const end = writeWords(sheet, part.words, x + room, y + size * 0.3, {
    size: size * 1.3,
    width: width - room,
  });
  return drawRules(sheet, facts, x, Math.max(end, y + size * 4.5), width, size * 0.95);
}

function drawCosts(
  sheet: Sheet,
  facts: BriefFacts,
  x: number,
  y: number,
  width: number,
  size: number,
): number {
  const { currency, options } = facts;
  if (currency === null) return y;
  return drawTable(
    sheet,
    {
      kind: 'table',
      caption: '',
      head: ['Option', 'Works', 'Cost'],
      rows: options.map(({ name, works, cost }) => [
        name,
        works,
        cost === null ? '–' : formatMoney(cost, currency),
      ]),
      numbers: [2],
      signs: [],
    },
    y,
    { x, width, size: size * 0.9, place: (at) => at },
  );
}

/** What was decided, or room to decide by hand; a line to sign on either way. */
function drawDecision(
  sheet: Sheet,
  facts: BriefFacts,
  x: number,
  y: number,
  width: number,
  size: number,
): number {
  const { decision } = facts;
  const plain = { size, width };
  let at = y;
  const paragraph = (text: string, face: 'regular' | 'bold' = 'regular') =>
    sheet.tag('P', () => {
      at = sheet.write(text, x, at, { ...plain, face }) + size * 0.3;
    });
  if (decision) {
    paragraph(decision.optionName, 'bold');
    paragraph(decision.reason);
    if (decision.reservations) paragraph(`Reservations: ${decision.reservations}`);
    paragraph(`Recorded by ${decision.decidedBy}, ${formatDate(decision.decidedAt)}.`);
  } else paragraph('Not decided yet.');
  at += size * 2.2;
  const half = (width - 16) / 2;
  sheet.ornament(() => {
    for (const left of [x, x + half + 16])
      sheet.doc
        .moveTo(left, at)
        .lineTo(left + half, at)
        .lineWidth(0.6)
        .stroke(printColours.ink);
  });
  sheet.tag('P', () => {
    const small = { size: size * 0.85, width: half, colour: printColours['ink-2'] };
    sheet.write('Place and date', x, at + 2, small);
    sheet.write('Signature', x + half + 16, at + 2, small);
  });
  return at + size * 1.6;
}
