import { ratios } from './state';

/**
 * Binomial quantile, operation for operation that of `sim-core/random/binomial.ts`, so that the same u, n and p give the
 * same number: small means walked up from 0, large ones summed outwards from the mode.
 */
export function binomialQuantile(u: f64, n: i32, p: f64): i32 {
  if (n == 0 || p <= 0) return 0;
  if (p >= 1) return n;
  if (p > 0.5) return n - walk(1 - u, n, 1 - p, true);
  return walk(u, n, p, false);
}

/** Smallest k with P(X ≤ k) ≥ u, or > u when `strict`; p at most a half. */
function walk(u: f64, n: i32, p: f64, strict: bool): i32 {
  const mean = <f64>n * p;
  if (mean > 200) return walkFromMode(u, n, p, strict);
  let probability: f64 = 1;
  let base = 1 - p;
  for (let left = n; ; base *= base) {
    if (left & 1) probability *= base;
    left >>= 1;
    if (left == 0) break;
  }
  let below = probability;
  if (strict ? below > u : below >= u) return 0;
  const odds = p / (1 - p);
  let k = 0;
  if (n < 32) {
    // As below, with the divisions done beforehand.
    let ratio = ratios + ((<usize>n) << 8);
    do {
      probability *= load<f64>(ratio) * odds;
      ratio += 8;
      k++;
      if (probability < 1e-18 && <f64>k > mean) break;
      below += probability;
    } while (k < n && (strict ? below <= u : below < u));
    return k;
  }
  do {
    probability *= (<f64>(n - k) / <f64>(k + 1)) * odds;
    k++;
    if (probability < 1e-18 && <f64>k > mean) break;
    below += probability;
  } while (k < n && (strict ? below <= u : below < u));
  return k;
}

const negligible: f64 = 1e-19;

function walkFromMode(u: f64, n: i32, p: f64, strict: bool): i32 {
  const odds = p / (1 - p);
  const mode = <i32>Math.floor(<f64>(n + 1) * p);
  let upTo: f64 = 1;
  for (let k = mode, weight: f64 = 1; k > 0 && weight > negligible; k--) {
    weight *= <f64>k / (<f64>(n - k + 1) * odds);
    upTo += weight;
  }
  let total = upTo;
  for (let k = mode, weight: f64 = 1; k < n && weight > negligible; k++) {
    weight *= (<f64>(n - k) / <f64>(k + 1)) * odds;
    total += weight;
  }
  const target = u * total;
  let k = mode;
  let weight: f64 = 1;
  if (strict ? upTo > target : upTo >= target) {
    while (k > 0 && (strict ? upTo - weight > target : upTo - weight >= target)) {
      upTo -= weight;
      weight *= <f64>k / (<f64>(n - k + 1) * odds);
      k--;
      if (weight <= negligible) break;
    }
    return k;
  }
  while (k < n && !(strict ? upTo > target : upTo >= target)) {
    weight *= (<f64>(n - k) / <f64>(k + 1)) * odds;
    k++;
    if (weight <= negligible) break;
    upTo += weight;
  }
  return k;
}
