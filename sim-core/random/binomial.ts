/**
 * Binomial quantile: the smallest k with P(X ≤ k) ≥ u for X ~ Binomial(n, p). Rises with u, with n and with p, which
 * is what lets options share their luck. Only +, −, ×, ÷: the same on every machine.
 *
 * Small means are walked up from 0 by the recurrence of the probabilities. Large ones sum the probabilities outwards
 * from the mode, scaled so that the mode weighs 1, which neither underflows nor needs a logarithm; the cost is about
 * 16 standard deviations, so n = 100,000 stays affordable.
 *
 * @param u strictly between 0 and 1
 * @param n whole, 0 or more
 * @param p clamped to 0..1
 */
export function binomialQuantile(u: number, n: number, p: number): number {
  if (n === 0 || p <= 0) return 0;
  if (p >= 1) return n;
  // Above a half, count what fails: the smallest k with P(X ≤ k) ≥ u leaves n − k = the smallest j with P(fail ≤ j) > 1 − u.
  if (p > 0.5) return n - walk(1 - u, n, 1 - p, true);
  return walk(u, n, p, false);
}

const largestWalkFromZero = 200;

/** Smallest k with P(X ≤ k) ≥ u, or > u when `strict`; p at most a half. */
function walk(u: number, n: number, p: number, strict: boolean): number {
  if (n * p > largestWalkFromZero) return walkFromMode(u, n, p, strict);
  const odds = p / (1 - p);
  let probability = power(1 - p, n);
  let below = probability;
  let k = 0;
  while (k < n && (strict ? below <= u : below < u)) {
    probability *= ((n - k) / (k + 1)) * odds;
    k++;
    // What is left adds nothing that a double can hold: u lies in the rounding of the sum.
    if (probability < 1e-18 && k > n * p) break;
    below += probability;
  }
  return k;
}

/** x^n by squaring. */
function power(x: number, n: number): number {
  let result = 1;
  for (let base = x, left = n; left > 0; left >>= 1, base *= base) if (left & 1) result *= base;
  return result;
}

const negligible = 1e-19;

function walkFromMode(u: number, n: number, p: number, strict: boolean): number {
  const odds = p / (1 - p);
  const mode = Math.floor((n + 1) * p);
  let upTo = 1;
  for (let k = mode, weight = 1; k > 0 && weight > negligible; k--) {
    weight *= k / ((n - k + 1) * odds);
    upTo += weight;
  }
  let total = upTo;
  for (let k = mode, weight = 1; k < n && weight > negligible; k++) {
    weight *= ((n - k) / (k + 1)) * odds;
    total += weight;
  }
  const target = u * total;
  const enough = (sum: number) => (strict ? sum > target : sum >= target);
  let k = mode;
  let weight = 1;
  if (enough(upTo)) {
    while (k > 0 && enough(upTo - weight)) {
      upTo -= weight;
      weight *= k / ((n - k + 1) * odds);
      k--;
      if (weight <= negligible) break;
    }
    return k;
  }
  while (k < n && !enough(upTo)) {
    weight *= ((n - k) / (k + 1)) * odds;
    k++;
    if (weight <= negligible) break;
    upTo += weight;
  }
  return k;
}
