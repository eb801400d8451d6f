import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { GrazerRates } from '#sim-core/spec/process-parameters.ts';
import { discreteGaussian, largestVariance, widestRadius } from '#sim-core/theory/spread-kernel.ts';

/** What a kernel needs where grazers are on. */
export interface Grazing {
  readonly rates: GrazerRates;
  /** T_G: weights of 0, 1 … radius cells; the whole sums to 1 */
  readonly taps: Float64Array;
  /** F surveyed, k/255; the kernel holds a copy that works raise and lower */
  readonly fence: Uint8Array;
}

/** D = clamp((−1 − X)/3, 0, 1): how dry it is for those that hunt grazers, 0 down to an index of −1, 1 from −4 on. */
export const dryness = (droughtIndex: number): number => Math.min(1, Math.max(0, (-1 - droughtIndex) / 3));

/** −Δt (m + p (1 − D)): what becomes of grazers in a step without plants and refuges, as a logarithm. */
export const grazerDecline = (
  { grazerMortality, predation }: GrazerRates,
  years: number,
  droughtIndex: number,
): number => -years * (grazerMortality + predation * (1 - dryness(droughtIndex)));

/**
 * The discrete Gaussian by which grazers spread in one step: on each axis its variance is s_G² Δt, so that a year of steps
 * comes to s_G whatever the step.
 *
 * @throws RunProblem at `processes.grazers.grazerSpread` where it would be wider than a run allows
 */
export function grazerTaps(
  { grazerSpread }: GrazerRates,
  cellSize: number,
  stepsPerYear: number,
): Float64Array {
  const inCells = grazerSpread / cellSize;
  const variance = (inCells * inCells) / stepsPerYear;
  if (variance === 0) return Float64Array.of(1);
  if (variance > largestVariance) {
    const most = Math.floor(Math.sqrt(largestVariance * stepsPerYear) * cellSize * 10) / 10;
    throw new RunProblem([
      {
        field: 'processes.grazers.grazerSpread',
        message:
          `Grazers that move ${grazerSpread} m in a year need a kernel wider than ${widestRadius} cells of ` +
          `${cellSize} m. Use at most ${most} m${stepsPerYear === 12 ? '' : ', more steps a year'}, or larger cells`,
      },
    ]);
  }
  return discreteGaussian(variance);
}
