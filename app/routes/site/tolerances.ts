import type { Rates } from '#sim-core/spec/parameters.ts';
import type { Tolerances } from '#app/yearline/YearlinePlot.tsx';

/** The two lines past which drought kills: on open marsh, and on a mound of full strength. */
export const tolerancesOf = ({
  tolerance,
  refugeShift,
}: Pick<Rates, 'tolerance' | 'refugeShift'>): Tolerances => ({
  open: tolerance,
  nearMound: tolerance - refugeShift,
});
