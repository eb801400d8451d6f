import { moments, type Moments } from '#sim-core/numeric/sums.ts';
import { stream } from '#sim-core/random/streams.ts';
import { shuffledOrder, wholeBelow } from '#sim-core/random/whole.ts';

/** A walk through the unit cube that moves one factor at a time: factors + 1 points to run. */
export interface Trajectory {
  readonly points: readonly Float64Array[];
  /** factor that moves between point i and i + 1 */
  readonly order: Uint32Array;
  /** by factor: how far it moves, Δ or −Δ */
  readonly moves: Float64Array;
}

/**
 * The walk of one draw: rows of Morris's matrix B* (Morris 1991, Technometrics 33:161–174).
 *
 * @param base lower value of each factor
 * @param rises whether each factor moves up from it, or down to it
 * @param order the factor that moves first, second …
 */
export function trajectoryFrom(
  base: ArrayLike<number>,
  rises: readonly boolean[],
  order: Uint32Array,
  delta: number,
): Trajectory {
  const point = Float64Array.from(rises, (up, factor) => base[factor] + (up ? 0 : delta));
  const points = [point.slice()];
  for (const factor of order) {
    point[factor] = base[factor] + (rises[factor] ? delta : 0);
    points.push(point.slice());
  }
  return { points, order, moves: Float64Array.from(rises, (up) => (up ? delta : -delta)) };
}

/**
 * Random walks on a grid of `levels` values a factor, with Δ = levels / (2 (levels − 1)), which visits each level as
 * often (Morris 1991).
 *
 * @param levels even, 4 unless said
 */
export function morrisTrajectories(seed: string, factors: number, walks: number, levels = 4): Trajectory[] {
  if (!(Number.isInteger(levels) && levels >= 2 && levels % 2 === 0))
    throw new RangeError(`Found ${levels} levels; Morris's design needs an even number, such as 4`);
  const random = stream(seed, 'screening');
  const delta = levels / (2 * (levels - 1));
  return Array.from({ length: walks }, () => {
    const base = Array.from({ length: factors }, () => wholeBelow(levels / 2, random) / (levels - 1));
    const rises = base.map(() => wholeBelow(2, random) === 1);
    return trajectoryFrom(base, rises, shuffledOrder(factors, random), delta);
  });
}

/** What moving one factor through its whole range does, all else anywhere. */
export interface FactorEffect {
  /** μ: mean elementary effect; 0 also where ups and downs cancel */
  readonly mean: number;
  /** μ*: mean size of the effects (Campolongo, Cariboni & Saltelli 2007, Environ. Model. Softw. 22:1509–1518) */
  readonly meanSize: number;
  /** standard error of `meanSize` */
  readonly meanSizeError: number;
  /** σ: sample standard deviation of the effects: bends and interactions */
  readonly deviation: number;
}

export interface MorrisScreening {
  /** @param outputs of the walk's points, in their order */
  add(walk: Trajectory, outputs: ArrayLike<number>): void;
  /** by factor; NaN before there are two walks for spreads, one for means */
  effects(): FactorEffect[];
}

/** Elementary effects from walks that stream in. */
export function morrisScreening(factors: number): MorrisScreening {
  const byFactor: { effects: Moments; sizes: Moments }[] = Array.from({ length: factors }, () => ({
    effects: moments(),
    sizes: moments(),
  }));
  return {
    add({ order, moves }, outputs) {
      if (order.length !== factors || outputs.length !== factors + 1)
        throw new RangeError(
          `Found a walk of ${order.length} factors with ${outputs.length} outputs; expected ${factors} and ${factors + 1}`,
        );
      order.forEach((factor, i) => {
        const effect = (outputs[i + 1] - outputs[i]) / moves[factor];
        byFactor[factor].effects.add(effect);
        byFactor[factor].sizes.add(Math.abs(effect));
      });
    },
    effects: () =>
      byFactor.map(({ effects, sizes }) => ({
        mean: effects.mean,
        meanSize: sizes.mean,
        meanSizeError: sizes.standardDeviation / Math.sqrt(sizes.count),
        deviation: effects.standardDeviation,
      })),
  };
}
