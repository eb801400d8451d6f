import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { power } from '#sim-core/numeric/power.ts';
import type { PalmerRecursion } from '#sim-core/spec/weather-source.ts';

/**
 * Share of Palmer's index that a month hands on to the next: X_t = 0.897 X_{t−1} + Z_t / 3 (Palmer 1965, US Weather
 * Bureau Research Paper 45; Alley 1984, J. Clim. Appl. Met. 23:1100). The recursion alone is not the full index, which
 * also switches between spells: hence "Palmer-type".
 */
export const monthlyMemory = 0.897;
/** What a month's moisture anomaly Z adds to the index. */
export const anomalyWeight = 1 / 3;

/**
 * Share of the index that is left after some years: 0.897^(12 years), or by what a year leaves where that is given.
 */
export const memoryOver = (years: number, yearly?: number): number =>
  yearly === undefined ? power(monthlyMemory, 12 * years) : power(yearly, years);

/** One step of the recursion around a mean. */
export const nextIndex = (index: number, memory: number, addition: number, mean = 0): number =>
  mean + memory * (index - mean) + addition;

/**
 * X_t = 0.897^(12Δt) X_{t−Δt} + normal noise (or with another memory a year), scaled so that the long-run standard deviation is the given one whatever
 * the step. One draw a step after the one for the start, so a longer horizon begins with the same years.
 *
 * @param uniform draws strictly between 0 and 1
 * @returns index of each step, Float64
 */
export function drawPalmerRecursion(
  { mean = 0, standardDeviation, memory: yearly, start }: PalmerRecursion,
  steps: number,
  stepsPerYear: number,
  uniform: () => number,
): Float64Array {
  const memory = memoryOver(1 / stepsPerYear, yearly);
  const noise = standardDeviation * Math.sqrt(1 - memory * memory);
  // Drawn in any case, so that naming a start leaves all later luck as it was.
  const drawnStart = mean + standardDeviation * normalQuantile(uniform());
  let index = start ?? drawnStart;
  return Float64Array.from(
    { length: steps },
    () => (index = nextIndex(index, memory, noise * normalQuantile(uniform()), mean)),
  );
}
