import {
  createRun,
  fitKernel,
  frontSpeed,
  referenceShare,
  RunProblem,
  stepRates,
  type FittedKernel,
} from '#sim-core/index.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { runSpecSchema, type StepsPerYear } from '#sim-core/spec/run-spec.ts';

/** What the rates of a plant come to on cells of one size. */
export interface Implications {
  /** undefined where no kernel gives the front speed asked for; `problems` then says why */
  readonly kernel: FittedKernel | undefined;
  /** the engine's own refusals, at `rates.<name>` */
  readonly problems: readonly FieldProblem[];
  /** ln 2 / r, years, losses aside */
  readonly doublingYears: number;
  /** share of good ground that the plant settles at without losses; 0 where it cannot hold itself */
  readonly settles: number;
  /** cover of good ground at the end of each year from `fillFrom` on, in years at index 0 */
  readonly fill: readonly number[];
  /** drought index at which half of the drought loss acts, by place */
  readonly halfLoss: Readonly<Record<Place, number>>;
}

export const places = ['open', 'neighbours', 'refuge', 'exposed'] as const;
/** Where a plant stands: alone on open ground, among full neighbours, on a full refuge, on fully exposed ground. */
export type Place = (typeof places)[number];

/** Cover that the fill curve starts with. */
export const fillFrom = 0.01;
const fillYears = 40;

/** What `rates` imply on cells of `cellSize` m, computed by the engine itself. */
export function implications(rates: Rates, cellSize: number, stepsPerYear: StepsPerYear): Implications {
  const { tolerance: open } = rates;
  const rest = {
    doublingYears: Math.LN2 / rates.fillRate,
    settles: referenceShare(stepRates(rates, stepsPerYear), 1),
    halfLoss: {
      open,
      neighbours: open - rates.neighbourShift,
      refuge: open - rates.refugeShift,
      exposed: open + rates.exposureShift,
    },
  };
  try {
    return {
      ...rest,
      kernel: fitKernel(rates, cellSize, stepsPerYear),
      problems: [],
      fill: fillCurve(rates, stepsPerYear),
    };
  } catch (error) {
    if (!(error instanceof RunProblem)) throw error;
    return { ...rest, kernel: undefined, problems: error.problems, fill: [] };
  }
}

/**
 * Cover of good ground at the end of each year from `fillFrom` on, at an index of 0. One cell stands for ground without
 * end: with a mirrored border its neighbours are itself, so neither its size nor the spread matters.
 */
export function fillCurve(rates: Rates, stepsPerYear: StepsPerYear): number[] {
  // A cell whose kernel has a variance of 1, which there is for any rates.
  const cellSize = rates.lateralSpread / frontSpeed(rates, 1, stepsPerYear, 1);
  const run = createRun({
    spec: runSpecSchema.parse({
      version: 1,
      mode: 'mean-field',
      seed: 'fill',
      surveyYear: 2000,
      years: fillYears,
      stepsPerYear,
      rates,
      layers: { cover: fillFrom },
      reportYears: [2000],
    }),
    grid: { width: 1, height: 1, cellSize, originX: 0, originY: 0, epsg: 0 },
    ground: {
      capacity: Uint8Array.of(255),
      vigour: Uint8Array.of(255),
      exposure: Uint8Array.of(0),
      refuge: Uint8Array.of(0),
      fence: Uint8Array.of(0),
      cover: Float32Array.of(fillFrom),
    },
  });
  const area = cellSize * cellSize;
  const shares = [run.survey.rows[0].coveredArea / area];
  for (let year = run.nextYear(); year; year = run.nextYear())
    shares.push(year.rows[year.rows.length - 1].coveredArea / area);
  return shares;
}

/** First year in which a fill curve has come to `share`; undefined where it does not. */
export function yearsToReach(fill: readonly number[], share: number): number | undefined {
  const year = fill.findIndex((cover) => cover >= share);
  return year < 0 ? undefined : year;
}

/** Years until a fill curve comes to `share`, straight between the ends of years; Infinity where it does not. */
export function yearsToFill(fill: readonly number[], share: number): number {
  const year = yearsToReach(fill, share);
  if (year === undefined || year === 0) return year ?? Infinity;
  return year - (fill[year] - share) / (fill[year] - fill[year - 1]);
}

/**
 * Share of standing plants lost in one year at a steady drought index: 1 − e^(−h), with
 * h = h_bg + h_max / (1 + e^((X − X^c)/ω)).
 *
 * @param halfLoss X^c, the index at which half of the drought loss acts
 */
export function yearlyLoss(
  rates: Pick<Rates, 'backgroundLoss' | 'droughtLoss' | 'lossWidth'>,
  halfLoss: number,
  droughtIndex: number,
): number {
  const drought = rates.droughtLoss / (1 + Math.exp((droughtIndex - halfLoss) / rates.lossWidth));
  return 1 - Math.exp(-(rates.backgroundLoss + drought));
}
