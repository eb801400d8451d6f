import type { BriefFacts } from '#contract/brief-content.ts';
import { printColours } from '../print-colours.ts';
import type { Sheet } from './sheet.ts';

const dashes: readonly (readonly number[])[] = [
  [],
  [4, 2],
  [1.5, 1.5],
  [6, 2, 1.5, 2],
  [8, 3],
  [3, 3],
  [1, 3],
  [10, 2, 2, 2],
];
const height = 150;

/** What the curves of an outlook show, in words. */
export function curvesInWords(facts: BriefFacts, outlook: number): string {
  const { surveyYear, years, options } = facts;
  return `Share of futures that have closed, from ${surveyYear} to ${surveyYear + years}, under “${facts.outlooks[outlook].name}”. At the horizon: ${facts.outlooks[
    outlook
  ].options
    .map(({ curve }, i) => `${options[i].name} ${Math.round(100 * (1 - (curve.at(-1)?.open ?? 1)))} of 100`)
    .join('; ')}.`;
}

/** How tall `drawCurves` is. */
export const curvesHeight = (facts: BriefFacts): number =>
  height + 34 + 11 * Math.ceil(facts.options.length / 2);

/** The share of futures that have closed over the years, a line an option; the band is that of the brief's own option. */
export function drawCurves(
  sheet: Sheet,
  facts: BriefFacts,
  outlook: number,
  x: number,
  y: number,
  width: number,
): void {
  const { doc } = sheet;
  const { surveyYear, years, options, lead } = facts;
  const left = x + 30;
  const span = width - 40;
  const top = y + 8;
  const foot = top + height;
  const at = (time: number) => left + (time / years) * span;
  const up = (closed: number) => foot - closed * height;
  sheet.tag(
    'Figure',
    () => {
      for (const share of [0, 0.25, 0.5, 0.75, 1]) {
        doc
          .moveTo(left, up(share))
          .lineTo(left + span, up(share))
          .lineWidth(0.4)
          .undash()
          .stroke(printColours.rule);
        sheet.write(String(100 * share), x, up(share) - 5, { size: 8, width: 26, align: 'right' });
      }
      const every = Math.max(1, Math.round(years / 7 / 5) * 5 || Math.ceil(years / 7));
      for (let time = 0; time <= years; time += every) {
        doc
          .moveTo(at(time), foot)
          .lineTo(at(time), foot + 3)
          .lineWidth(0.6)
          .stroke(printColours.ink);
        sheet.write(String(surveyYear + time), at(time) - 12, foot + 5, { size: 8, width: 40 });
      }
      const { curve: leading } = facts.outlooks[outlook].options[lead];
      const steps = (value: (point: { open: number; low: number; high: number }) => number) => {
        const points: [number, number][] = [];
        leading.forEach((point, i) => {
          if (i > 0) points.push([at(point.time), up(1 - value(leading[i - 1]))]);
          points.push([at(point.time), up(1 - value(point))]);
        });
        return points;
      };
      const band = [...steps((p) => p.low), ...steps((p) => p.high).reverse()];
      if (band.length > 2)
        doc
          .polygon(...band)
          .fillOpacity(0.5)
          .fill(printColours['rule-2'])
          .fillOpacity(1);
      facts.outlooks[outlook].options.forEach(({ curve }, i) => {
        let last = 0;
        doc.moveTo(at(0), up(0));
        for (const { time, open } of curve) {
          doc.lineTo(at(time), up(last)).lineTo(at(time), up(1 - open));
          last = 1 - open;
        }
        doc.lineTo(at(years), up(last));
        stroke(i);
      });
      options.forEach(({ name }, i) => {
        const keyLeft = left + (i % 2) * (span / 2);
        const keyTop = foot + 22 + Math.floor(i / 2) * 11;
        doc.moveTo(keyLeft, keyTop + 5).lineTo(keyLeft + 26, keyTop + 5);
        stroke(i);
        sheet.write(name, keyLeft + 32, keyTop, {
          size: 8.5,
          width: span / 2 - 36,
          face: i === lead ? 'bold' : 'regular',
        });
      });
    },
    curvesInWords(facts, outlook),
  );

  function stroke(i: number): void {
    // The brief's own option is the whole line.
    const dash = i === lead ? dashes[0] : dashes[1 + (i % (dashes.length - 1))];
    doc.lineWidth(i === lead ? 1.8 : 1);
    if (dash.length > 0) doc.dash([...dash] as unknown as number, {});
    doc.stroke(printColours.ink).undash();
  }
}
