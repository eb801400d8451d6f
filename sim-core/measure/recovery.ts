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

/**
 * First calendar year, from the year of recovery on, at whose end ΣC < target · ΣC* again; null where recovery never
 * came or was kept to the horizon.
 */
export function lostYear(
  series: readonly Pick<SeriesRow, 'time' | 'recoveredShare'>[],
  target: number,
): number | null {
  const recovered = recoveredYear(series, target);
  if (recovered === null) return null;
  const lost = series.find(
    (row) => Number.isInteger(row.time) && row.time >= recovered && row.recoveredShare < target,
  );
  return lost?.time ?? null;
}
