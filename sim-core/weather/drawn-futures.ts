import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { drawWeather, type WeatherOfRun } from './draw-weather.ts';

/** Quantiles of the index that are told for each year. */
export const futureQuantiles = [0.05, 0.25, 0.5, 0.75, 0.95] as const;

/** What many drawn weathers come to, by year. */
export interface DrawnFutures {
  readonly futures: number;
  /** driest index of each year of the first few futures */
  readonly examples: readonly (readonly number[])[];
  /** by year, of `futureQuantiles`: the driest index of the year */
  readonly band: readonly (readonly number[])[];
  /** by line, as given */
  readonly lines: readonly KillingChance[];
}

/** How often years fall below a line. */
export interface KillingChance {
  readonly below: number;
  /** by year: share of futures in which the year's driest index lies below the line */
  readonly inYear: readonly number[];
  /** by year: share of futures in which it, or a year before it, does */
  readonly byThen: readonly number[];
}

const shown = 12;

/**
 * Draws futures of a weather, from a seed of their own, and counts the years that fall below each line. A share of n
 * futures has a standard error of √(p(1 − p)/n), at most 1.6 of 100 with 1,000.
 */
export function drawnFutures(
  weather: Omit<WeatherOfRun, 'seed' | 'replicate'>,
  below: readonly number[],
  futures = 1000,
): DrawnFutures {
  const { years, stepsPerYear } = weather;
  const all = Array.from({ length: futures }, (_, replicate) => {
    const steps = drawWeather({ ...weather, seed: 'examples', replicate });
    return Float64Array.from({ length: years }, (__, y) =>
      steps.subarray(y * stepsPerYear, (y + 1) * stepsPerYear).reduce((a, b) => Math.min(a, b)),
    );
  });
  const lines = below.map((line) => {
    const inYear = new Array<number>(years).fill(0);
    const byThen = new Array<number>(years).fill(0);
    for (const future of all) {
      let ever = false;
      future.forEach((index, y) => {
        if (index < line) {
          inYear[y]++;
          ever = true;
        }
        if (ever) byThen[y]++;
      });
    }
    const share = (count: number) => count / futures;
    return { below: line, inYear: inYear.map(share), byThen: byThen.map(share) };
  });
  return {
    futures,
    examples: all.slice(0, shown).map((future) => [...future]),
    band: Array.from({ length: years }, (_, y) =>
      quantiles(
        all.map((future) => future[y]),
        [...futureQuantiles],
      ),
    ),
    lines,
  };
}
