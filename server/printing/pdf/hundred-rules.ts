import type { BriefFacts } from '#contract/brief-content.ts';
import { of100 } from '#sim-core/compare/chance-words.ts';
import { printColours } from '../print-colours.ts';
import type { Sheet } from './sheet.ts';

/** What the rules of 100 show, in words: for readers who do not see them. */
export const rulesInWords = ({
  options,
  outlooks: [first],
}: Pick<BriefFacts, 'options' | 'outlooks'>): string =>
  `Futures of 100 that close before the next drought: ${first.options
    .map(
      ({ chance }, i) =>
        `${options[i].name} ${of100(chance.estimate)} (${of100(chance.low)} to ${of100(chance.high)})`,
    )
    .join('; ')}.`;

/** The chance of every option as a rule of 100 futures that can be counted, its interval above; returns where they end. */
export function drawRules(
  sheet: Sheet,
  facts: BriefFacts,
  x: number,
  y: number,
  width: number,
  size: number,
): number {
  const { doc } = sheet;
  const label = width * 0.27;
  const row = size * 2.35;
  const figures = facts.outlooks[0].options;
  sheet.tag(
    'Figure',
    () => {
      figures.forEach(({ chance }, i) => {
        const top = y + i * row;
        const lead = i === facts.lead;
        const { name } = facts.options[i];
        const setting = { size, width: label - 8, face: lead ? ('bold' as const) : ('regular' as const) };
        sheet.write(fitted(sheet, name, setting), x, top + row * 0.42, setting);
        const left = x + label;
        const span = width - label - size * 2.6;
        const filled = of100(chance.estimate);
        const step = span / 100;
        const foot = top + row * 0.86;
        for (let k = 0; k < 100; k++) {
          const tall = k < filled ? row * 0.4 : row * 0.13;
          doc
            .rect(left + k * step + step * 0.12, foot - tall, step * 0.72, tall)
            .fill(k < filled ? (lead ? printColours.ink : printColours['ink-2']) : printColours.rule);
        }
        const at = (share: number) => left + share * span;
        const bar = top + row * 0.28;
        doc
          .moveTo(at(chance.low), bar)
          .lineTo(at(chance.high), bar)
          .moveTo(at(chance.low), bar - 2)
          .lineTo(at(chance.low), bar + 2)
          .moveTo(at(chance.high), bar - 2)
          .lineTo(at(chance.high), bar + 2)
          .moveTo(left, foot + 0.6)
          .lineTo(left + span, foot + 0.6)
          .lineWidth(0.7)
          .stroke(printColours.ink);
        sheet.write(String(filled), left + span + 2, top + row * 0.36, {
          size: size * 1.25,
          face: 'bold',
          width: size * 2.4,
          align: 'right',
        });
      });
    },
    rulesInWords(facts),
  );
  return y + figures.length * row + size * 0.5;
}

/** A name cut to what fits on one line. */
export function fitted(
  sheet: Sheet,
  name: string,
  setting: { size: number; width: number; face?: 'regular' | 'bold' },
): string {
  if (sheet.widthOf(name, setting) <= setting.width) return name;
  let cut = name;
  while (cut.length > 1 && sheet.widthOf(`${cut}…`, setting) > setting.width) cut = cut.slice(0, -1);
  return `${cut.trimEnd()}…`;
}
