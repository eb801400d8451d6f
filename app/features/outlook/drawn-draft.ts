import { parseNumber } from '#app/lib/parse-number.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';
import { shortestWait, type DrawnWeather, type SeriesValue } from '#sim-core/spec/weather-source.ts';

export type DrawnKind = 'listed' | DrawnWeather['kind'];

/** Weather that replicates draw, as typed. Fields of other kinds are kept while one is tried. */
export interface DrawnDraft {
  readonly kind: DrawnKind;
  /** renewal of droughts: mean years from one beginning to the next, years since the latest, length, index, its spread */
  readonly returnYears: string;
  readonly sinceLatest: string;
  readonly length: string;
  readonly depth: string;
  readonly depthSpread: string;
  /** index in other years */
  readonly between: string;
  /** Palmer-type: long-run mean and standard deviation */
  readonly mean: string;
  readonly standardDeviation: string;
}

const start: DrawnDraft = {
  kind: 'listed',
  returnYears: '12',
  sinceLatest: '3',
  length: '2',
  depth: '-4',
  depthSpread: '0.5',
  between: '0',
  mean: '0',
  standardDeviation: '2',
};

/** What a waiting law that this form did not make comes to as a mean of years is shown as. */
const yearsOf = (law: Extract<DrawnWeather, { kind: 'renewal' }>['returnInterval']): number =>
  law.law === 'fixed' ? law.years : law.law === 'exponential' ? law.mean : law.scale;

export function startDrawn(drawn: DrawnWeather | null): DrawnDraft {
  switch (drawn?.kind) {
    case undefined:
      return start;
    case 'series':
      return { ...start, kind: 'series' };
    case 'palmer-type':
      return {
        ...start,
        kind: 'palmer-type',
        mean: String(drawn.mean ?? 0),
        standardDeviation: String(drawn.standardDeviation),
      };
    case 'renewal':
      return {
        ...start,
        kind: 'renewal',
        returnYears: String(yearsOf(drawn.returnInterval)),
        sinceLatest: String(drawn.sinceLatest),
        length: String(yearsOf(drawn.length)),
        depth: String(drawn.depth),
        depthSpread: String(drawn.depthSpread ?? 0),
        between: String(drawn.between ?? 0),
      };
  }
}

type Blank = Exclude<keyof DrawnDraft, 'kind'>;
const limits: Record<Blank, readonly [least: number, most: number]> = {
  returnYears: [shortestWait, 10_000],
  sinceLatest: [0, 10_000],
  length: [shortestWait, 10_000],
  depth: [driest, wettest],
  depthSpread: [0, 10],
  between: [driest, wettest],
  mean: [driest, wettest],
  standardDeviation: [0, 10],
};
const blanksOf: Record<DrawnKind, readonly Blank[]> = {
  listed: [],
  series: [],
  'palmer-type': ['mean', 'standardDeviation'],
  renewal: ['returnYears', 'sinceLatest', 'length', 'depth', 'depthSpread', 'between'],
};

/** What is wrong with the blanks of the chosen kind; empty when nothing is. */
export function drawnErrors(draft: DrawnDraft): Partial<Record<Blank, string>> {
  const errors: Partial<Record<Blank, string>> = {};
  for (const blank of blanksOf[draft.kind]) {
    const [least, most] = limits[blank];
    const value = parseNumber(draft[blank]);
    if (value === undefined || value < least || value > most)
      errors[blank] = `Found “${draft[blank].trim()}”; a number from ${least} to ${most} is expected`;
  }
  const [depth, between] = [parseNumber(draft.depth), parseNumber(draft.between)];
  if (draft.kind === 'renewal' && !errors.depth && !errors.between && depth! > between!)
    errors.depth = `Found ${draft.depth.trim()}; a drought is no milder than the ${draft.between.trim()} between droughts`;
  return errors;
}

/**
 * The weather that the draft stands for: null where all replicates take the list, undefined while something is wrong.
 *
 * @param listed the values of the outlook by year, which are the record that a series reads on from a drawn year
 */
export function drawnWeather(
  draft: DrawnDraft,
  listed: readonly SeriesValue[],
): DrawnWeather | null | undefined {
  if (Object.keys(drawnErrors(draft)).length > 0) return undefined;
  const number = (blank: Blank) => parseNumber(draft[blank]) ?? 0;
  switch (draft.kind) {
    case 'listed':
      return null;
    case 'series':
      return { kind: 'series', order: 'from a drawn year', values: [...listed] };
    case 'palmer-type':
      return { kind: 'palmer-type', mean: number('mean'), standardDeviation: number('standardDeviation') };
    case 'renewal':
      return {
        kind: 'renewal',
        returnInterval: { law: 'exponential', mean: number('returnYears') },
        sinceLatest: number('sinceLatest'),
        depth: number('depth'),
        depthSpread: number('depthSpread'),
        length: { law: 'fixed', years: number('length') },
        between: number('between'),
      };
  }
}
