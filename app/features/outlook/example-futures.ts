import { drawWeather } from '#sim-core/index.ts';
import type { Outlook } from '#contract/outlooks.ts';

/** What drawn weather looks like: some futures, and how often each year is dry enough to kill. */
export interface ExampleFutures {
  /** driest index of each year, by future */
  readonly futures: readonly (readonly number[])[];
  /** by year: share of all drawn futures with an index below what open marsh bears */
  readonly killing: readonly number[];
  /** share of futures with at least one such year */
  readonly anyKilling: number;
}

const shown = 12;
const drawn = 400;

/**
 * Futures of an outlook whose weather is drawn, from a seed of their own: an ensemble has its own luck.
 *
 * @param tolerance index below which a year kills on open marsh
 */
export function exampleFutures(outlook: Outlook, tolerance: number): ExampleFutures | undefined {
  const { drawn: droughtIndex, surveyYear, years, stepsPerYear } = outlook;
  if (!droughtIndex) return undefined;
  const all = Array.from({ length: drawn }, (_, replicate) => {
    const steps = drawWeather({ droughtIndex, surveyYear, years, stepsPerYear, seed: 'examples', replicate });
    return Array.from({ length: years }, (__, y) =>
      Math.min(...steps.subarray(y * stepsPerYear, (y + 1) * stepsPerYear)),
    );
  });
  const share = (count: number) => count / drawn;
  return {
    futures: all.slice(0, shown),
    killing: Array.from({ length: years }, (_, y) =>
      share(all.filter((future) => future[y] < tolerance).length),
    ),
    anyKilling: share(all.filter((future) => future.some((index) => index < tolerance)).length),
  };
}
