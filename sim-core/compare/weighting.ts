/** Something that an option is judged by. */
export interface Criterion {
  /** by option */
  readonly values: readonly number[];
  readonly better: 'more' | 'less';
  /** any number from 0 on; only their ratios count */
  readonly weight: number;
}

export interface Weighting {
  /** 0 to 1 by option: weighted mean of the values on scales from the worst option to the best */
  readonly scores: number[];
  /** options, best first; ties in the order given */
  readonly ranking: number[];
  /** by option: 1 for the best; alike scores share a place, and the places after them stay empty */
  readonly places: number[];
  /**
   * by criterion: shares of all weight, 0 to 1, between which the first option stays first while the others keep their
   * ratios. `share` is the present one.
   */
  readonly room: readonly { readonly share: number; readonly low: number; readonly high: number }[];
}

/**
 * Ranking by a weighted mean, and how far each weight can move before another option comes first. With the share s of
 * one criterion every score is a straight line in s, so the room ends where a line crosses that of the first option.
 *
 * @throws RangeError of no criterion, unlike lengths, or no weight at all
 */
export function weighOptions(criteria: readonly Criterion[]): Weighting {
  const options = criteria[0]?.values.length ?? 0;
  if (options === 0 || criteria.some(({ values }) => values.length !== options))
    throw new RangeError('Every criterion needs a value of every option, and at least one of each is needed');
  const total = criteria.reduce((sum, { weight }) => sum + weight, 0);
  if (!(total > 0) || criteria.some(({ weight }) => !(weight >= 0)))
    throw new RangeError('Weights are 0 or more, and at least one must be above 0');
  const scaled = criteria.map(onScale);
  const scores = Array.from(
    { length: options },
    (_, option) => criteria.reduce((sum, { weight }, c) => sum + weight * scaled[c][option], 0) / total,
  );
  const ranking = scores.map((_, option) => option).sort((a, b) => scores[b] - scores[a] || a - b);
  // Sums of shares differ in their last digits where the scores are alike.
  const places = scores.map((score) => 1 + scores.filter((other) => other > score + 1e-9).length);
  const room = criteria.map(({ weight }, c) => ({
    share: weight / total,
    ...roomOf(ranking[0], scaled[c], restScores(criteria, scaled, c), weight / total),
  }));
  return { scores, ranking, places, room };
}

/** 0 for the worst option, 1 for the best; 1 for all where they are alike, so that none is set back. */
function onScale({ values, better }: Criterion): number[] {
  const [low, high] = [Math.min(...values), Math.max(...values)];
  return values.map((value) => {
    if (high === low) return 1;
    const share = (value - low) / (high - low);
    return better === 'more' ? share : 1 - share;
  });
}

/** Scores by all criteria but one, in their ratios; alike where they have no weight. */
function restScores(criteria: readonly Criterion[], scaled: readonly number[][], without: number): number[] {
  const rest = criteria.reduce((sum, { weight }, c) => sum + (c === without ? 0 : weight), 0);
  return scaled[0].map((_, option) =>
    rest === 0
      ? 0
      : criteria.reduce((sum, { weight }, c) => sum + (c === without ? 0 : weight * scaled[c][option]), 0) /
        rest,
  );
}

function roomOf(first: number, own: readonly number[], rest: readonly number[], share: number) {
  let [low, high] = [0, 1];
  for (let other = 0; other < own.length; other++) {
    if (other === first) continue;
    // Lead at s: s · (own lead) + (1 − s) · (lead by the rest).
    const ownLead = own[first] - own[other];
    const restLead = rest[first] - rest[other];
    if (ownLead === restLead) continue;
    const crossing = restLead / (restLead - ownLead);
    if (crossing >= 0 && crossing <= 1) {
      if (ownLead > restLead) low = Math.max(low, Math.min(crossing, share));
      else high = Math.min(high, Math.max(crossing, share));
    }
  }
  return { low, high };
}
