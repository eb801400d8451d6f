import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { StepsPerYear } from '#sim-core/spec/run-spec.ts';
import { latticeSpeed } from './lattice-speed.ts';
import {
  discreteGaussian,
  largestVariance,
  logMoment,
  logMomentOfTaps,
  widestRadius,
} from './spread-kernel.ts';
import { stepRates } from './step-rates.ts';

/** The rates that decide the spread kernel. */
export type SpreadRates = Pick<Rates, 'lateralSpread' | 'fillRate' | 'carryOver'>;

export interface FittedKernel {
  /** t, cells² a step, on each axis */
  readonly variance: number;
  /** cells */
  readonly radius: number;
  /** weights of 0, 1 … radius cells; the whole sums to 1 */
  readonly taps: Float64Array;
  /** speed of a straight front along the rows, m/yr: of the kernel as cut, so up to 2 % below `lateralSpread` */
  readonly frontSpeed: number;
  /** the same along the diagonal, m/yr */
  readonly diagonalFrontSpeed: number;
  /** what the user should know, in words */
  readonly warnings: readonly string[];
}

/** Below this next to nothing leaves its cell. Cells² a step. */
const smallestVariance = 1.1e-6;
/** Diagonal against straight speed below which the lattice shows. */
const coarse = 0.95;

/**
 * Speed of a straight front, m/yr, from the whole discrete Gaussian: (Δx/Δt) min over θ of (1/θ) ln(σ_Δ + gβ M(θ, φ)).
 * 0 where growth is too slow for a front.
 *
 * @param variance t, cells² a step
 * @param angle φ between the front's normal and the rows: `straight` 0, `diagonal` π/4
 * @param vigour g, growth as a share of growth on good ground
 */
export function frontSpeed(
  rates: SpreadRates,
  cellSize: number,
  stepsPerYear: number,
  variance: number,
  angle: 'straight' | 'diagonal' = 'straight',
  vigour = 1,
): number {
  const { carryOver, recruits } = stepRates({ ...rates, seedlingRate: 0 }, stepsPerYear);
  const [cosine, sine] = angle === 'straight' ? [1, 0] : [Math.SQRT1_2, Math.SQRT1_2];
  const front = latticeSpeed(carryOver, vigour * recruits, logMoment(variance, cosine, sine));
  return (front?.speed ?? 0) * cellSize * stepsPerYear;
}

/**
 * What keeps any kernel from giving a straight front the speed `lateralSpread` on such cells and steps, at
 * `rates.<name>`, with the cell size or rate that would; empty where one does.
 *
 * @param cellSize Δx, m
 */
export function spreadProblems(
  rates: SpreadRates,
  cellSize: number,
  stepsPerYear: StepsPerYear,
): FieldProblem[] {
  const wanted = rates.lateralSpread;
  const speed = (variance: number) => frontSpeed(rates, cellSize, stepsPerYear, variance);
  if (!(wanted > 0) || !(rates.fillRate > 0))
    return (['lateralSpread', 'fillRate'] as const)
      .filter((name) => !(rates[name] > 0))
      .map((name) => ({
        field: `rates.${name}`,
        message: `Found ${rates[name]}; a front advances only where this is above 0`,
      }));
  const slowest = speed(smallestVariance);
  if (wanted < slowest)
    return [
      {
        field: 'rates.lateralSpread',
        message:
          `A front of ${figure(wanted)} m/yr cannot be shown on cells of ${figure(cellSize)} m: it would take ` +
          `${figure(cellSize / wanted)} years to cross one, and with a fill-in rate of ${figure(rates.fillRate)} ` +
          `a year no kernel is that slow. Use cells of ${figure(roundDown((cellSize * wanted) / slowest))} m or ` +
          `less, or a lateral spread of ${figure(roundUp(slowest))} m/yr or more`,
      },
    ];
  const fastest = speed(largestVariance);
  if (wanted > fastest)
    return [
      {
        field: 'rates.lateralSpread',
        message:
          `A front of ${figure(wanted)} m/yr on cells of ${figure(cellSize)} m with ${stepsPerYear} steps a year needs a kernel ` +
          `wider than ${widestRadius} cells. Use cells of ${figure(roundUp((cellSize * wanted) / fastest))} m or more, ` +
          `or a lateral spread of ${figure(roundDown(fastest))} m/yr or less`,
      },
    ];
  return [];
}

/**
 * The spread kernel that gives a straight front the speed `lateralSpread`, by bisection on ln t: the speed rises with t.
 *
 * @param cellSize Δx, m
 * @throws RunProblem with the `spreadProblems` where there are any
 */
export function fitKernel(rates: SpreadRates, cellSize: number, stepsPerYear: StepsPerYear): FittedKernel {
  const problems = spreadProblems(rates, cellSize, stepsPerYear);
  if (problems.length > 0) throw new RunProblem(problems);
  const variance = varianceFor(rates.lateralSpread, (t) => frontSpeed(rates, cellSize, stepsPerYear, t));
  const taps = discreteGaussian(variance);
  const { carryOver, recruits } = stepRates({ ...rates, seedlingRate: 0 }, stepsPerYear);
  const cut = (cosine: number, sine: number) =>
    (latticeSpeed(carryOver, recruits, logMomentOfTaps(taps, cosine, sine))?.speed ?? 0) *
    cellSize *
    stepsPerYear;
  return {
    variance,
    radius: taps.length - 1,
    taps,
    frontSpeed: cut(1, 0),
    diagonalFrontSpeed: cut(Math.SQRT1_2, Math.SQRT1_2),
    warnings: coarsenessWarning(rates, cellSize, stepsPerYear, variance),
  };
}

function varianceFor(wanted: number, speed: (variance: number) => number): number {
  let low = log(smallestVariance);
  let high = log(largestVariance);
  for (let i = 0; i < 60 && high - low > 1e-13; i++) {
    const middle = (low + high) / 2;
    if (speed(exp(middle)) < wanted) low = middle;
    else high = middle;
  }
  return exp((low + high) / 2);
}

/** v(π/4)/v(0): 1 where the lattice does not show. It rises with t. */
const evenness = (rates: SpreadRates, stepsPerYear: number, variance: number): number =>
  frontSpeed(rates, 1, stepsPerYear, variance, 'diagonal') / frontSpeed(rates, 1, stepsPerYear, variance);

function coarsenessWarning(
  rates: SpreadRates,
  cellSize: number,
  stepsPerYear: StepsPerYear,
  variance: number,
): string[] {
  const ratio = evenness(rates, stepsPerYear, variance);
  if (ratio >= coarse) return [];
  let low = log(variance);
  let high = log(largestVariance);
  for (let i = 0; i < 40; i++) {
    const middle = (low + high) / 2;
    if (evenness(rates, stepsPerYear, exp(middle)) < coarse) low = middle;
    else high = middle;
  }
  const fineCell = rates.lateralSpread / frontSpeed(rates, 1, stepsPerYear, exp(high));
  const other = ([1, 2, 4, 12] as const).find((steps) => {
    if (steps === stepsPerYear) return false;
    const speed = (t: number) => frontSpeed(rates, cellSize, steps, t);
    return evenness(rates, steps, varianceFor(rates.lateralSpread, speed)) >= coarse;
  });
  return [
    `A cell of ${figure(cellSize)} m is coarse for a front of ${figure(rates.lateralSpread)} m/yr and ` +
      `${stepsPerYear === 1 ? 'yearly steps' : `${stepsPerYear} steps a year`}: fronts along the diagonal run at ` +
      `${Math.round(ratio * 100)} % of those along the rows. Cells of ${figure(roundDown(fineCell))} m or less ` +
      `would mend it${other ? `, and so would ${other === 1 ? 'one step' : `${other} steps`} a year` : ''}.`,
  ];
}

/** Three significant digits, without a tail of zeros. */
const figure = (x: number): string => String(Number(x.toPrecision(3)));
/** Two significant digits, never above (below) what holds. */
const roundDown = (x: number): number => twoDigits(x, Math.floor);
const roundUp = (x: number): number => twoDigits(x, Math.ceil);
function twoDigits(x: number, round: (x: number) => number): number {
  const exponent = Number(x.toExponential().split('e')[1]) - 1;
  return Number((round(x / 10 ** exponent) * 10 ** exponent).toPrecision(2));
}
