/** What an option costs and what it gains, in any units. */
export interface CostAndGain {
  readonly cost: number;
  readonly gain: number;
}

export interface Efficiency {
  /** index of an option that costs no more and gains no less, and is better in one of them; undefined where there is none */
  readonly beatenBy: number | undefined;
}

/**
 * Which options are efficient: none other gains as much for as little (Pareto 1906). Of options alike in both, none
 * beats the other.
 */
export function efficiency(options: readonly CostAndGain[]): Efficiency[] {
  return options.map((mine) => {
    const beats = (other: CostAndGain) =>
      other.cost <= mine.cost &&
      other.gain >= mine.gain &&
      (other.cost < mine.cost || other.gain > mine.gain);
    // The one that gains most, and of these the cheapest, says it best.
    const beatenBy = options.reduce<number | undefined>((best, other, i) => {
      if (!beats(other)) return best;
      const held = best === undefined ? undefined : options[best];
      return !held || other.gain > held.gain || (other.gain === held.gain && other.cost < held.cost)
        ? i
        : best;
    }, undefined);
    return { beatenBy };
  });
}

/** Indices of the efficient options, from cheap to dear: the line that joins them in a picture of cost and gain. */
export function efficientLine(options: readonly CostAndGain[]): number[] {
  return efficiency(options)
    .flatMap(({ beatenBy }, i) => (beatenBy === undefined ? [i] : []))
    .sort((a, b) => options[a].cost - options[b].cost || options[a].gain - options[b].gain);
}
