import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';

/** A pulled front: what its foremost, thin edge does. */
export interface Front {
  /** cells a step (or whatever unit M's θ is the inverse of) */
  readonly speed: number;
  /** θ at the minimum: the edge falls off as e^(−θx) */
  readonly decay: number;
}

/**
 * Speed of a pulled front: min over θ > 0 of (1/θ) ln(S + B M(θ)), for S that stay in place, B recruits and a dispersal
 * kernel with moment generating function M (Weinberger 1982, SIAM J. Math. Anal. 13:353–396; with adults that stay put:
 * Neubert & Caswell 2000, Ecology 81:1613–1628). By golden section on ln θ.
 *
 * @param logM ln M(θ); Infinity where M does not exist
 * @returns undefined where S + B ≤ 1: nothing advances
 */
export function latticeSpeed(
  stay: number,
  recruits: number,
  logM: (theta: number) => number,
): Front | undefined {
  if (!(recruits > 0) || stay + recruits <= 1) return undefined;
  const speedAt = (lnTheta: number) => {
    const theta = exp(lnTheta);
    const m = logM(theta);
    return (m + log(recruits + stay * exp(-m))) / theta;
  };
  let left = -14;
  let right = 6.5;
  let a = right - goldenShare * (right - left);
  let b = left + goldenShare * (right - left);
  let atA = speedAt(a);
  let atB = speedAt(b);
  for (let i = 0; i < 90; i++) {
    // Where both are infinite (M does not exist), the minimum lies to the left.
    if (atA <= atB) {
      right = b;
      b = a;
      atB = atA;
      a = right - goldenShare * (right - left);
      atA = speedAt(a);
    } else {
      left = a;
      a = b;
      atA = atB;
      b = left + goldenShare * (right - left);
      atB = speedAt(b);
    }
  }
  return { speed: Math.min(atA, atB), decay: exp((left + right) / 2) };
}

const goldenShare = (Math.sqrt(5) - 1) / 2;
