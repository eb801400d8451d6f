import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { droughtIndexBySteps } from '#sim-core/spec/run-spec.ts';
import { drawPalmerRecursion, type PalmerRecursion } from './palmer-recursion.ts';
import { drawRenewal, type DroughtRenewal } from './renewal.ts';
import { drawSeries, seriesProblems, type DroughtSeries, type WeatherSpan } from './series.ts';
import { meanWait, type WaitingLaw } from './waiting-law.ts';

/** Where the drought index comes from. */
export type WeatherSource =
  /** the same in every replicate: one value for all steps, one a year, or one a step */
  | { readonly kind: 'list'; readonly values: number | number[] }
  | ({ readonly kind: 'series' } & DroughtSeries)
  | ({ readonly kind: 'palmer-type' } & PalmerRecursion)
  | ({ readonly kind: 'renewal' } & DroughtRenewal);

/** Indices that a run takes; a draw beyond is held there. */
export const driest = -15;
export const wettest = 15;

/**
 * Drought index of every step of one replicate, Float64, years × stepsPerYear; follows from the seed and the replicate
 * alone (stream `weather/<replicate>`), so options under one outlook share it.
 *
 * @throws RunProblem naming each field of the source that is wrong, e.g. `weather.returnInterval.mean`
 */
export function drawWeather(
  source: WeatherSource,
  span: WeatherSpan & { readonly seed: string; readonly replicate: number },
): Float64Array {
  const problems = weatherProblems(source, span);
  if (problems.length > 0) throw new RunProblem(problems);
  const steps = span.years * span.stepsPerYear;
  const words = stream(span.seed, `weather/${span.replicate}`);
  const draw = () => uniform(words.int32() >>> 0);
  return indicesOf(source, span, steps, draw).map((x) => Math.min(wettest, Math.max(driest, x)));
}

function indicesOf(
  source: WeatherSource,
  span: WeatherSpan,
  steps: number,
  draw: () => number,
): Float64Array {
  switch (source.kind) {
    case 'list':
      return droughtIndexBySteps({ ...span, droughtIndex: source.values });
    case 'series':
      return drawSeries(source, span, draw);
    case 'palmer-type':
      return drawPalmerRecursion(source, steps, span.stepsPerYear, draw);
    case 'renewal':
      return drawRenewal(source, steps, span.stepsPerYear, draw);
  }
}

/** What is wrong with a source for such a run, field by field. */
export function weatherProblems(source: WeatherSource, span: WeatherSpan): FieldProblem[] {
  switch (source.kind) {
    case 'list':
      return listProblems(source.values, span);
    case 'series':
      return seriesProblems(source, span).map((p) => ({ ...p, field: `weather.${p.field}` }));
    case 'palmer-type':
      return [
        ...between('mean', source.mean ?? 0, driest, wettest),
        ...between('standardDeviation', source.standardDeviation, 0, 10),
        ...between('start', source.start ?? 0, driest, wettest),
      ];
    case 'renewal':
      return [
        ...lawProblems('returnInterval', source.returnInterval),
        ...between('sinceLatest', source.sinceLatest, 0, 10_000),
        ...between('depth', source.depth, driest, Math.min(wettest, source.between ?? 0)),
        ...between('depthSpread', source.depthSpread ?? 0, 0, 10),
        ...lawProblems('length', source.length),
        ...between('between', source.between ?? 0, driest, wettest),
      ];
  }
}

function between(field: string, found: number, low: number, high: number): FieldProblem[] {
  return found >= low && found <= high
    ? []
    : [{ field: `weather.${field}`, message: `Found ${found}; expected ${low} to ${high}` }];
}

function listProblems(
  values: number | readonly number[],
  { years, stepsPerYear }: WeatherSpan,
): FieldProblem[] {
  if (typeof values === 'number') return between('values', values, driest, wettest);
  const steps = years * stepsPerYear;
  if (values.length !== years && values.length !== steps)
    return [
      {
        field: 'weather.values',
        message:
          `Found ${values.length} values; expected one for each of ${years} years` +
          (steps === years ? '' : ` or one for each of ${steps} steps`),
      },
    ];
  return values.flatMap((value, i) => between(`values.${i}`, value, driest, wettest));
}

/** Shortest mean interval, years: shorter ones are no droughts apart, and would be drawn for ever. */
const shortestWait = 0.01;

function lawProblems(field: string, wait: WaitingLaw): FieldProblem[] {
  const parameters = Object.entries(wait).filter(([name]) => name !== 'law') as [string, number][];
  const problems = parameters.flatMap(([name, found]) =>
    name === 'shape'
      ? between(`${field}.shape`, found, 0.05, 1000)
      : between(`${field}.${name}`, found, shortestWait, 10_000),
  );
  if (problems.length > 0) return problems;
  const mean = meanWait(wait);
  return mean >= shortestWait
    ? []
    : [
        {
          field: `weather.${field}`,
          message: `Comes to a mean of ${mean} years; expected ${shortestWait} or more`,
        },
      ];
}
