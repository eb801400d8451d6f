import type { BriefFacts } from '#contract/brief-content.ts';
import { formatLength } from '#contract/formats.ts';
import { closingRamp, printColours } from '../print-colours.ts';
import { fitted } from './hundred-rules.ts';
import type { Sheet } from './sheet.ts';

const mostInRow = 4;

/** The closing years of every option as a small map, with their works as flags; returns where they end. */
export function drawMaps(
  sheet: Sheet,
  facts: BriefFacts,
  paths: readonly (string | undefined)[],
  x: number,
  y: number,
  width: number,
  size: number,
): number {
  const shown = facts.options.flatMap((_, i) => (paths[i] === undefined ? [] : [i]));
  if (shown.length === 0) return y;
  const columns = Math.min(mostInRow, shown.length);
  const gap = 8;
  const room = (width - gap * (columns - 1)) / columns;
  const shape = facts.grid.height / facts.grid.width;
  // A tall site must not push everything else off the page.
  const mapWidth = Math.min(room, (size * 19) / shape);
  const mapHeight = mapWidth * shape;
  const rowHeight = size * 1.7 + mapHeight + gap;
  shown.forEach((option, place) => {
    const left = x + (place % columns) * (room + gap);
    const top = y + Math.floor(place / columns) * rowHeight;
    drawMap(sheet, facts, option, paths[option]!, { left, top, room, mapWidth, mapHeight, size });
  });
  const end = y + Math.ceil(shown.length / columns) * rowHeight;
  return drawLegend(sheet, facts, x, end, width, size, mapWidth);
}

interface MapBox {
  readonly left: number;
  readonly top: number;
  readonly room: number;
  readonly mapWidth: number;
  readonly mapHeight: number;
  readonly size: number;
}

function drawMap(sheet: Sheet, facts: BriefFacts, option: number, path: string, box: MapBox): void {
  const { doc } = sheet;
  const { left, top, room, mapWidth, mapHeight, size } = box;
  const { name, works, places } = facts.options[option];
  const face = option === facts.lead ? ('bold' as const) : ('regular' as const);
  sheet.tag('Caption', () => {
    sheet.write(fitted(sheet, name, { size, width: room, face }), left, top, { size, width: room, face });
  });
  const mapTop = top + size * 1.55;
  sheet.tag(
    'Figure',
    () => {
      doc.save().rect(left, mapTop, mapWidth, mapHeight).clip();
      if (!sheet.trial) doc.image(path, left, mapTop, { width: mapWidth, height: mapHeight });
      const radius = places.length > 60 ? 0.8 : 1.5;
      for (const [u, v] of places) {
        if (u < 0 || u > 1 || v < 0 || v > 1) continue;
        doc.circle(left + u * mapWidth, mapTop + v * mapHeight, radius).lineWidth(0.4);
        doc.fillAndStroke(printColours.flag, printColours.ink);
      }
      doc.restore();
      doc.rect(left, mapTop, mapWidth, mapHeight).lineWidth(0.5).stroke(printColours.rule);
    },
    `Map of ${name}: ${works}. Colours give the year in which each place closes; see the words beside it.`,
  );
}

/** The ramp with its years, what else the map shows, and a scale. */
function drawLegend(
  sheet: Sheet,
  facts: BriefFacts,
  x: number,
  y: number,
  width: number,
  size: number,
  mapWidth: number,
): number {
  const { doc } = sheet;
  const { surveyYear, years, grid } = facts;
  const small = size * 0.88;
  const ramp = 90;
  const box = small * 0.8;
  const first = String(surveyYear + 1);
  const last = String(surveyYear + years);
  const metres = niceLength((grid.width * grid.cellSize) / 3);
  const scale = (metres / (grid.width * grid.cellSize)) * mapWidth;
  sheet.tag(
    'Figure',
    () => {
      let at = x;
      const word = (text: string) => {
        sheet.write(text, at, y, { size: small, width: 140 });
        at += sheet.widthOf(text, { size: small });
      };
      word(`closes ${first} `);
      closingRamp.forEach((colour, i) =>
        doc
          .rect(at + 2 + (i * ramp) / closingRamp.length, y + 1, ramp / closingRamp.length + 0.2, box)
          .fill(colour),
      );
      at += ramp + 6;
      word(last);
      const swatch = (colour: string, label: string, hatched = false) => {
        at += 10;
        doc.rect(at, y + 1, box * 1.3, box).fill(colour);
        if (hatched) {
          doc
            .save()
            .rect(at, y + 1, box * 1.3, box)
            .clip();
          for (let k = -1; k < 4; k++) doc.moveTo(at + k * 3, y + 1 + box).lineTo(at + k * 3 + box, y + 1);
          doc.lineWidth(0.5).stroke(printColours.late).restore();
        }
        at += box * 1.3 + 3;
        word(label);
      };
      swatch('#eef1f1', 'open', true);
      swatch(printColours.standing, 'stands');
      swatch(printColours.water, 'cannot grow');
      at += 12;
      doc
        .circle(at, y + 1 + box / 2, 1.6)
        .lineWidth(0.4)
        .fillAndStroke(printColours.flag, printColours.ink);
      at += 4;
      word('works');
      const end = x + width;
      const label = formatLength(metres);
      const labelWidth = sheet.widthOf(label, { size: small });
      sheet.write(label, end - labelWidth, y, { size: small, width: labelWidth + 4 });
      doc
        .moveTo(end - labelWidth - 4 - scale, y + box * 0.7)
        .lineTo(end - labelWidth - 4, y + box * 0.7)
        .lineWidth(1.4)
        .stroke(printColours.ink);
    },
    `Legend of the maps: from light in ${first} to dark in ${last}; hatched stays open, grey stood at the survey, blue-grey cannot hold the plant, coral dots are works. The scale is ${formatLength(metres)}.`,
  );
  return y + small * 1.5;
}

/** The largest of 1, 2 and 5 times a power of ten that is no longer than `metres`. */
export function niceLength(metres: number): number {
  const power = 10 ** Math.floor(Math.log10(metres));
  return [5, 2, 1].map((times) => times * power).find((length) => length <= metres) ?? power;
}
