import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { distanceOf, type AbcPlan, type AbcState } from './abc.ts';
import type { Figure } from '#sim-core/spec/fit-figure.ts';

/** What was foreseen of a figure of a year by a fit to all other years. */
export interface LeftOutFigure {
  readonly figure: Figure;
  /** middle nine tenths of the runs that fit the other years best, and their median */
  readonly low: number;
  readonly middle: number;
  readonly high: number;
  readonly within: boolean;
}

export interface LeftOutYear {
  readonly year: number;
  readonly figures: readonly LeftOutFigure[];
}

/**
 * Leaves out the figures of one year after the other, keeps the runs of the prior that come nearest to those that are
 * left (rejection, as in the first generation; no run is made anew) and says what they foresee of the year left out.
 * Runs carry the errors of the observed figures already.
 *
 * @param state of a fit whose first generation is complete
 * @returns nothing where there is only one year
 */
export function leaveOneOut(
  plan: AbcPlan,
  state: Pick<AbcState, 'prior' | 'scales'>,
  figures: readonly Figure[],
): LeftOutYear[] {
  const years = [...new Set(figures.map(({ year }) => year))].sort((a, b) => a - b);
  if (years.length < 2 || state.prior.length === 0) return [];
  const keep = Math.max(1, Math.min(plan.population, Math.round(state.prior.length / 10)));
  return years.map((year) => {
    const scales = state.scales.map((scale, i) => (figures[i].year === year ? 0 : scale));
    const nearest = state.prior
      .map(({ summaries }) => ({ summaries, distance: distanceOf(plan.observed, summaries, scales) }))
      .sort((a, b) => a.distance - b.distance)
      .slice(0, keep);
    const foreseen = figures.flatMap((figure, i): LeftOutFigure[] => {
      if (figure.year !== year) return [];
      const [low, middle, high] = quantiles(
        nearest.map(({ summaries }) => summaries[i]),
        [0.05, 0.5, 0.95],
      );
      return [{ figure, low, middle, high, within: figure.observed >= low && figure.observed <= high }];
    });
    return { year, figures: foreseen };
  });
}
