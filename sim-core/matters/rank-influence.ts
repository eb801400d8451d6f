import { normalBound, type Interval } from '#sim-core/ensemble/proportion.ts';
import { rankCorrelation, ranks } from '#sim-core/ensemble/rank-correlation.ts';
import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';

/** How the ranks of an output hang together with those of one factor, over points that vary all factors at once. */
export interface RankInfluence {
  /** Spearman's correlation, with whatever the other factors did at the same time */
  readonly correlation: number;
  /** with what the other factors explain taken out of both */
  readonly partial: Interval;
}

export interface RankRegression {
  /** by factor */
  readonly factors: readonly RankInfluence[];
  /** share of the variance of the output's ranks that a line in all factors' ranks explains, less what chance would give it */
  readonly explained: number;
}

/** Fewest points for so many factors: Fisher's interval needs four more. */
export const leastPoints = (factors: number): number => factors + 4;

/**
 * Partial rank correlations (Iman & Conover 1979, Technometrics 21:499–509; used with Latin hypercubes by Marino et al.
 * 2008, J. Theor. Biol. 254:178–196), with Fisher's interval (1924, Metron 3:329–332), and the adjusted R² of the ranks.
 *
 * @param factors values of each factor, by point
 * @param output by point; equal values, as those cut at the horizon are, share their rank
 * @returns undefined where there are too few points, a factor or the output never changes, or factors move together
 */
export function rankInfluence(
  factors: readonly ArrayLike<number>[],
  output: ArrayLike<number>,
  level = 0.95,
): RankRegression | undefined {
  const points = output.length;
  if (factors.length === 0 || points < leastPoints(factors.length)) return undefined;
  const ranked = [...factors, output].map(ranks);
  const among = ranked.map((a, i) => ranked.map((b, j) => (i === j ? 1 : rankCorrelation(a, b))));
  const inverse = invert(among);
  if (!inverse) return undefined;
  const y = factors.length;
  const half = normalBound(level) / Math.sqrt(points - 3 - (factors.length - 1));
  const explained = 1 - 1 / inverse[y][y];
  return {
    factors: factors.map((_, i) => {
      const estimate = -inverse[i][y] / Math.sqrt(inverse[i][i] * inverse[y][y]);
      return { correlation: among[i][y], partial: fisher(Math.max(-1, Math.min(1, estimate)), half) };
    }),
    explained: Math.max(0, 1 - ((1 - explained) * (points - 1)) / (points - factors.length - 1)),
  };
}

function fisher(estimate: number, half: number): Interval {
  if (Math.abs(estimate) > 1 - 1e-12) return { estimate, low: estimate, high: estimate };
  const z = log((1 + estimate) / (1 - estimate)) / 2;
  const back = (at: number) => 1 - 2 / (exp(2 * at) + 1);
  return { estimate, low: back(z - half), high: back(z + half) };
}

/** Gauss and Jordan with the largest pivot first; undefined of a matrix that has no inverse, or holds no numbers. */
function invert(matrix: readonly (readonly number[])[]): number[][] | undefined {
  const n = matrix.length;
  const rows = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let c = 0; c < n; c++) {
    let pivot = c;
    for (let r = c + 1; r < n; r++) if (Math.abs(rows[r][c]) > Math.abs(rows[pivot][c])) pivot = r;
    if (!(Math.abs(rows[pivot][c]) > 1e-10)) return undefined;
    [rows[c], rows[pivot]] = [rows[pivot], rows[c]];
    const by = rows[c][c];
    rows[c] = rows[c].map((value) => value / by);
    for (let r = 0; r < n; r++) {
      const share = rows[r][c];
      if (r !== c && share !== 0) rows[r] = rows[r].map((value, j) => value - share * rows[c][j]);
    }
  }
  return rows.map((row) => row.slice(n));
}
