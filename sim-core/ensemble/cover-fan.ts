import { quantileOf } from './quantile.ts';

/** Shares of the fan of cover over time. */
export const fanShares = [0.05, 0.25, 0.5, 0.75, 0.95] as const;

/** Levels that values are held in; see `coverFan`. */
const levels = 4096;

export interface CoverFan {
  /** A replicate's value at each time. */
  add(values: ArrayLike<number>): void;
  readonly count: number;
  /** for each share, its quantile at each time; `shares` are the fan's unless said */
  quantiles(shares?: readonly number[]): Float64Array[];
}

/**
 * Quantiles of type 7 over replicates at each time, from values that stream in: counts of 4,096 levels, so 16 kB a time
 * however many replicates, and the same whatever their order. Levels are even in the square root of the value, so they
 * are fine where there is little: each value, and so each quantile, is off by at most √(value · most) / 4,000: 0.025 % of
 * the most at the top, 0.0025 % of it where a hundredth is covered.
 *
 * @param most largest value that can be, e.g. the ground's ΣK in m²
 */
export function coverFan(times: number, most: number): CoverFan {
  /** replicates by time and level */
  const counts = new Uint32Array(times * levels);
  let count = 0;
  const valueOf = (level: number) => most * (level / (levels - 1)) ** 2;
  const quantilesAt = (time: number, shares: readonly number[]) => {
    const here = counts.subarray(time * levels, (time + 1) * levels);
    const valueAt = (k: number) => {
      let level = 0;
      for (let below = here[0]; below <= k; below += here[level]) level++;
      return valueOf(level);
    };
    return shares.map((p) => quantileOf(count, p, valueAt));
  };
  return {
    add(values) {
      if (values.length !== times)
        throw new RangeError(`Found ${values.length} values; expected one at each of ${times} times`);
      const held = Array.from(values, (value) => {
        if (!(value >= 0 && value <= most * (1 + 1e-6)))
          throw new RangeError(`Found a value of ${value}; expected 0 to ${most}`);
        return most > 0 ? Math.round(Math.sqrt(Math.min(1, value / most)) * (levels - 1)) : 0;
      });
      held.forEach((level, time) => counts[time * levels + level]++);
      count++;
    },
    get count() {
      return count;
    },
    quantiles(shares = fanShares) {
      const byTime = Array.from({ length: times }, (_, time) => quantilesAt(time, shares));
      return shares.map((_, s) => Float64Array.from(byTime, (q) => q[s]));
    },
  };
}
