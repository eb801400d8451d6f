import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import type { DrawnFutures } from '#sim-core/weather/drawn-futures.ts';

/** Drought indices below which plants die: alone on open marsh, and on a full refuge. */
export interface Tolerances {
  readonly open: number;
  readonly mound: number;
}

export interface YearIndex {
  readonly year: number;
  readonly index: number;
}

/** A listed year: what was typed, and what acts once the trend is added. */
export interface ListedYear extends YearIndex {
  readonly acting: number;
}

/** `2049`, `2049 and 2050`, `2031, 2049 to 2051`; from eight stretches on the rest is counted. */
export function listYears(years: readonly number[]): string {
  const stretches: [number, number][] = [];
  for (const year of years) {
    const last = stretches.at(-1);
    if (last && last[1] === year - 1) last[1] = year;
    else stretches.push([year, year]);
  }
  const words = stretches.flatMap(([from, to]) =>
    from === to ? [`${from}`] : to === from + 1 ? [`${from}`, `${to}`] : [`${from} to ${to}`],
  );
  if (words.length > 8) return `${words.slice(0, 7).join(', ')} and ${words.length - 7} more`;
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}

/** What the series means for the plant, one sentence each. */
export function outlookWords(series: readonly YearIndex[], tolerances: Tolerances): string[] {
  const below = (tolerance: number) =>
    series.filter(({ index }) => index < tolerance).map(({ year }) => year);
  const open = below(tolerances.open);
  if (open.length === 0)
    return [
      `No year of ${series.length} is dry enough to kill open marsh.`,
      'An outlook without a drought is the kindest there is: options look alike under it.',
    ];
  const mound = below(tolerances.mound);
  const words = [
    `${open.length} of ${formatCounted(series.length, 'year')} would kill open marsh: ${listYears(open)}.`,
    mound.length === 0
      ? 'Near a mound the marsh bears them all.'
      : mound.length === open.length
        ? 'Near a mound the marsh does not bear them either.'
        : `Near a mound it still dies in ${listYears(mound)}.`,
  ];
  const first = series[0].year;
  const last = series[series.length - 1].year;
  const bounds = [first - 1, ...open, last + 1];
  let best = { from: first, to: first - 1 };
  for (let i = 1; i < bounds.length; i++) {
    const stretch = { from: bounds[i - 1] + 1, to: bounds[i] - 1 };
    if (stretch.to - stretch.from > best.to - best.from) best = stretch;
  }
  const length = best.to - best.from + 1;
  if (length > 0)
    words.push(
      `The longest stretch without such a year is ${formatCounted(length, 'year')}` +
        `${length > 1 ? `, ${best.from} to ${best.to}` : `, ${best.from}`}: ` +
        (best.to === last
          ? 'no drought ends it within this outlook.'
          : 'what has not closed by then starts again from its footholds.'),
    );
  return words;
}

/**
 * What weather that is drawn means for the plant, one sentence each; the listed years come after it, as what they are.
 *
 * @param futures undefined until they are drawn
 */
export function drawnOutlookWords(
  futures: Pick<DrawnFutures, 'futures' | 'lines'> | undefined,
  series: readonly YearIndex[],
  tolerances: Tolerances,
): string[] {
  const last = series[series.length - 1].year;
  const words = [
    'The weather is drawn: runs and comparisons take futures of it, each with its own droughts.',
  ];
  if (futures) {
    const [open, mound] = futures.lines.map(({ byThen }) => formatNumber(100 * byThen[byThen.length - 1], 0));
    words.push(
      `By ${last}, a year dry enough to kill open marsh comes in ${open} % of futures, and one that kills near a mound too in ${mound} %.`,
    );
  }
  const listed = series.filter(({ index }) => index < tolerances.open).map(({ year }) => year);
  words.push(
    `The listed years act only where a run is told to take them: ${
      listed.length === 0
        ? `none of the ${series.length} would kill open marsh.`
        : `${listed.length} of ${formatCounted(series.length, 'year')} would kill open marsh, ${listYears(listed)}.`
    }`,
  );
  return words;
}

/** What one year does, after its index: `kills open marsh, not near a mound`. */
export function yearEffect(index: number, { open, mound }: Tolerances): string {
  if (index < Math.min(open, mound)) return 'kills marsh, also near a mound';
  if (index < open) return 'kills open marsh, not near a mound';
  return 'open marsh bears it';
}
