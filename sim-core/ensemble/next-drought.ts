import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { wilsonInterval, type Interval } from './proportion.ts';

/** First calendar year with an index at or below `threshold`, or null where none comes by the horizon. */
export function nextDroughtYear(
  series: readonly Pick<SeriesRow, 'time' | 'droughtIndex'>[],
  threshold: number,
): number | null {
  const first = series.find((row) => row.droughtIndex !== null && row.droughtIndex <= threshold);
  return first ? Math.ceil(first.time) : null;
}

/**
 * What came first. A year's drought acts before the year's end, so recovering in the year of the drought is not before
 * it. `neither` came by the horizon: what would have come first is not known.
 */
export function firstToCome(
  recoveredYear: number | null,
  droughtYear: number | null,
): 'recovery' | 'drought' | 'neither' {
  if (recoveredYear !== null && (droughtYear === null || recoveredYear < droughtYear)) return 'recovery';
  return droughtYear === null ? 'neither' : 'drought';
}

/** How many futures closed before the next drought. */
export interface BeforeDrought {
  readonly recovery: number;
  readonly drought: number;
  readonly neither: number;
  /**
   * share of all futures in which recovery is known to have come first, with its Wilson interval. Futures in which
   * neither came are among the rest, so the share is never flattered; undefined of no futures
   */
  readonly share: Interval | undefined;
}

export function beforeDrought(
  counts: Pick<BeforeDrought, 'recovery' | 'drought' | 'neither'>,
  level = 0.95,
): BeforeDrought {
  const all = counts.recovery + counts.drought + counts.neither;
  return { ...counts, share: all > 0 ? wilsonInterval(counts.recovery, all, level) : undefined };
}
