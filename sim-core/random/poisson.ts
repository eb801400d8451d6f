import { exp } from '#sim-core/numeric/exp.ts';

/**
 * Poisson quantile: the smallest k with P(X ≤ k) ≥ u for X ~ Poisson(mean). Rises with u and with the mean, which is
 * what lets options share their luck; the same on every machine.
 *
 * Small means are walked up from 0 by the recurrence of the probabilities, p_(k+1) = p_k mean/(k + 1). Large ones sum
 * them outwards from the mode, scaled so that the mode weighs 1; the cost is about 16 standard deviations.
 *
 * @param u strictly between 0 and 1
 * @param mean 0 or more
 */
export function poissonQuantile(u: number, mean: number): number {
  // e^(−mean) ≥ 1 − mean: where u is below that, most often, nothing need be computed.
  if (u <= 1 - mean || mean <= 0) return 0;
  if (mean > largestWalkFromZero) return walkFromMode(u, mean);
  let probability = exp(-mean);
  let below = probability;
  let k = 0;
  while (below < u) {
    k++;
    probability *= mean / k;
    // What is left adds nothing that a double can hold: u lies in the rounding of the sum.
    if (probability < 1e-18 && k > mean) break;
    below += probability;
  }
  return k;
}

const largestWalkFromZero = 200;
const negligible = 1e-19;

function walkFromMode(u: number, mean: number): number {
  const mode = Math.floor(mean);
  let upTo = 1;
  let lowest = mode;
  for (let weight = 1; lowest > 0 && weight > negligible; lowest--) {
    weight *= lowest / mean;
    upTo += weight;
  }
  let total = upTo;
  for (let k = mode + 1, weight = 1; weight > negligible; k++) {
    weight *= mean / k;
    total += weight;
  }
  const target = u * total;
  let k = mode;
  let weight = 1;
  if (upTo >= target) {
    while (k > lowest && upTo - weight >= target) {
      upTo -= weight;
      weight *= k / mean;
      k--;
    }
    return k;
  }
  while (upTo < target) {
    k++;
    weight *= mean / k;
    if (weight <= negligible) break;
    upTo += weight;
  }
  return k;
}
