import { parseNumber } from '#app/lib/parse-number.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';
import {
  shortestWait,
  type DrawnWeather,
  type SeriesValue,
  type WaitingLaw,
} from '#sim-core/spec/weather-source.ts';
import { lawOf } from '#sim-core/weather/fit-waiting-law.ts';
import { memoryOver } from '#sim-core/weather/palmer-recursion.ts';
import { meanWait } from '#sim-core/weather/waiting-law.ts';

export type DrawnKind = 'listed' | DrawnWeather['kind'];
export type LawName = WaitingLaw['law'];

/** Weather that replicates draw, as typed. Fields of other kinds are kept while one is tried. */
export interface DrawnDraft {
  readonly kind: DrawnKind;
  /** renewal of droughts: mean years from one beginning to the next, years since the latest, length, index, its spread */
  readonly returnYears: string;
  readonly returnLaw: LawName;
  /** of a Weibull or gamma law */
  readonly returnShape: string;
  readonly sinceLatest: string;
  readonly length: string;
  readonly lengthLaw: LawName;
  readonly lengthShape: string;
  readonly depth: string;
  readonly depthSpread: string;
  /** index in other years */
  readonly between: string;
  /** Palmer-type: long-run mean and standard deviation */
  readonly mean: string;
  readonly standardDeviation: string;
  /** share of the index that a year hands on */
  readonly memory: string;
  /** index at the end of the survey year, as fitted; drawn where there is none */
  readonly start: number | undefined;
  /** values that a series reads on from, where they are not the listed years: those of the drought record */
  readonly record: readonly SeriesValue[] | undefined;
}

function tidy(x: number): number {
  return Math.round(x * 1000) / 1000;
}

const start: DrawnDraft = {
  kind: 'listed',
  returnYears: '12',
  returnLaw: 'exponential',
  returnShape: '2',
  sinceLatest: '3',
  length: '2',
  lengthLaw: 'fixed',
  lengthShape: '2',
  depth: '-4',
  depthSpread: '0.5',
  between: '0',
  mean: '0',
  standardDeviation: '2',
  memory: String(tidy(memoryOver(1))),
  start: undefined,
  record: undefined,
};

/** @param listed the values of the outlook by year */
export function startDrawn(drawn: DrawnWeather | null, listed: readonly SeriesValue[] = []): DrawnDraft {
  switch (drawn?.kind) {
    case undefined:
      return start;
    case 'series':
      return {
        ...start,
        kind: 'series',
        record: JSON.stringify(drawn.values) === JSON.stringify(listed) ? undefined : drawn.values,
      };
    case 'palmer-type':
      return {
        ...start,
        kind: 'palmer-type',
        mean: String(drawn.mean ?? 0),
        standardDeviation: String(drawn.standardDeviation),
        memory: String(drawn.memory ?? tidy(memoryOver(1))),
        start: drawn.start,
      };
    case 'renewal':
      return {
        ...start,
        kind: 'renewal',
        returnYears: String(tidy(meanWait(drawn.returnInterval))),
        returnLaw: drawn.returnInterval.law,
        returnShape: shapeOf(drawn.returnInterval),
        sinceLatest: String(drawn.sinceLatest),
        length: String(tidy(meanWait(drawn.length))),
        lengthLaw: drawn.length.law,
        lengthShape: shapeOf(drawn.length),
        depth: String(drawn.depth),
        depthSpread: String(drawn.depthSpread ?? 0),
        between: String(drawn.between ?? 0),
      };
  }
}

const shapeOf = (wait: WaitingLaw) => ('shape' in wait ? String(wait.shape) : '2');

/** The law that a mean and a shape stand for. */
const waitOf = (law: LawName, mean: number, shape: number): WaitingLaw =>
  law === 'fixed' ? { law, years: mean } : lawOf(law, mean, shape);

export type Blank = Exclude<keyof DrawnDraft, 'kind' | 'returnLaw' | 'lengthLaw' | 'start' | 'record'>;
const limits: Record<Blank, readonly [least: number, most: number]> = {
  returnYears: [shortestWait, 10_000],
  returnShape: [0.05, 1000],
  sinceLatest: [0, 10_000],
  length: [shortestWait, 10_000],
  lengthShape: [0.05, 1000],
  depth: [driest, wettest],
  depthSpread: [0, 10],
  between: [driest, wettest],
  mean: [driest, wettest],
  standardDeviation: [0, 10],
  memory: [0, 0.999],
};
export const hasShape = (law: LawName): boolean => law === 'weibull' || law === 'gamma';

/** The blanks that the chosen kind and laws show. */
function blanksOf({ kind, returnLaw, lengthLaw }: DrawnDraft): readonly Blank[] {
  if (kind === 'palmer-type') return ['mean', 'standardDeviation', 'memory'];
  if (kind !== 'renewal') return [];
  return [
    ...(hasShape(returnLaw) ? (['returnShape'] as const) : []),
    ...(hasShape(lengthLaw) ? (['lengthShape'] as const) : []),
    ...(['returnYears', 'sinceLatest', 'length', 'depth', 'depthSpread', 'between'] as const),
  ];
}

/** What is wrong with the blanks of the chosen kind; empty when nothing is. */
export function drawnErrors(draft: DrawnDraft): Partial<Record<Blank, string>> {
  const errors: Partial<Record<Blank, string>> = {};
  for (const blank of blanksOf(draft)) {
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
 * @param listed the values of the outlook by year, which a series reads on from a drawn year unless it has a record
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
      return { kind: 'series', order: 'from a drawn year', values: [...(draft.record ?? listed)] };
    case 'palmer-type':
      return {
        kind: 'palmer-type',
        mean: number('mean'),
        standardDeviation: number('standardDeviation'),
        ...(number('memory') !== tidy(memoryOver(1)) && { memory: number('memory') }),
        ...(draft.start !== undefined && { start: draft.start }),
      };
    case 'renewal':
      return {
        kind: 'renewal',
        returnInterval: waitOf(draft.returnLaw, number('returnYears'), number('returnShape')),
        sinceLatest: number('sinceLatest'),
        depth: number('depth'),
        depthSpread: number('depthSpread'),
        length: waitOf(draft.lengthLaw, number('length'), number('lengthShape')),
        between: number('between'),
      };
  }
}
