import type { SeriesRow } from '#sim-core/spec/run-result.ts';

/**
 * First calendar year in which ΣC ≥ target · ΣC*, or null where that did not come by the horizon: such a run is
 * censored, not failed.
 */
export function recoveredYear(
  series: readonly Pick<SeriesRow, 'time' | 'recoveredShare'>[],
  target: number,
): number | null {
  const first = series.find((row) => row.recoveredShare >= target);
  return first ? Math.ceil(first.time) : null;
}
