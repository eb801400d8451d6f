import type seedrandom from 'seedrandom';
import { exp } from '#sim-core/numeric/exp.ts';
import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { uniform } from '#sim-core/random/philox.ts';

/** A point of the unit cube with its share of belief; shares of a population sum to 1. */
export interface WeightedPoint {
  readonly point: readonly number[];
  readonly weight: number;
}

/** Draws new points about a population, and says how dense its draws are anywhere. */
export interface Moves {
  draw(random: seedrandom.PRNG): number[];
  /** up to a factor that is the same everywhere in the cube */
  density(point: readonly number[]): number;
}

/** Share of the cube's own variance that moves have at least, so that a population that has met in a point can leave it. */
const leastVariance = 1e-8 / 12;

/**
 * Moves by a normal law of twice the population's weighted covariance (Beaumont et al. 2009, Biometrika 96:983–990; with
 * all covariances Filippi et al. 2013, Stat. Appl. Genet. Mol. Biol. 12:87–107). What falls outside the cube is drawn
 * anew, member included, so the draws' density keeps its form within the cube.
 *
 * @param population at least one point
 */
export function movesAbout(population: readonly WeightedPoint[]): Moves {
  const lower = lowerRoot(covarianceOf(population).map((row) => row.map((value) => 2 * value)));
  const normal = (random: seedrandom.PRNG) => normalQuantile(uniform(random.int32() >>> 0));
  return {
    draw(random) {
      for (;;) {
        const { point } = memberAt(population, uniform(random.int32() >>> 0));
        const steps = point.map(() => normal(random));
        const moved = point.map((value, i) => value + lower[i].reduce((sum, l, j) => sum + l * steps[j], 0));
        if (moved.every((value) => value > 0 && value < 1)) return moved;
      }
    },
    density(at) {
      let total = 0;
      for (const { point, weight } of population) {
        let squares = 0;
        const solved: number[] = [];
        for (let i = 0; i < at.length; i++) {
          let rest = at[i] - point[i];
          for (let j = 0; j < i; j++) rest -= lower[i][j] * solved[j];
          solved.push(rest / lower[i][i]);
          squares += solved[i] ** 2;
        }
        total += weight * exp(-squares / 2);
      }
      return total;
    },
  };
}

/** The member in whose stretch of the shares, laid end to end, `u` falls. */
function memberAt(population: readonly WeightedPoint[], u: number): WeightedPoint {
  let left = u;
  for (const member of population) {
    left -= member.weight;
    if (left < 0) return member;
  }
  return population[population.length - 1];
}

function covarianceOf(population: readonly WeightedPoint[]): number[][] {
  const dimensions = population[0].point.length;
  const mean = Array.from({ length: dimensions }, (_, i) =>
    population.reduce((sum, { point, weight }) => sum + weight * point[i], 0),
  );
  return mean.map((_, i) =>
    mean.map((_, j) => {
      const shared = population.reduce(
        (sum, { point, weight }) => sum + weight * (point[i] - mean[i]) * (point[j] - mean[j]),
        0,
      );
      return i === j ? shared + leastVariance : shared;
    }),
  );
}

/** L of a covariance Σ = L Lᵀ (Cholesky), row by row, zeros right of the diagonal. */
function lowerRoot(covariance: readonly (readonly number[])[]): number[][] {
  const root = covariance.map((row) => row.map(() => 0));
  covariance.forEach((row, i) => {
    for (let j = 0; j <= i; j++) {
      let rest = row[j];
      for (let k = 0; k < j; k++) rest -= root[i][k] * root[j][k];
      // Rates that move in lockstep leave nothing of their own; rounding may even take it below 0.
      root[i][j] = i === j ? Math.sqrt(Math.max(rest, leastVariance)) : rest / root[j][j];
    }
  });
  return root;
}
