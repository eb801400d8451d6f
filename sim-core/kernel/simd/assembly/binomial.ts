import { ratios } from './state';
import { bitTwice, halfTwice, oneTwice, wordUnit } from './vectors';

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

/** Most sites of a cell for `drawPair`. */
export const fewSites: i32 = 31;

/**
 * The sum of the two quantiles of a cell with few sites, both walked up at once: Binomial(n, p1) of the first random word
 * and Binomial(N − n, p2) of the second. The same operations as one by one, so the same numbers; that the walks need not
 * look out for their end is because u is no nearer to 1 than 2^−33.
 *
 * @param chance address of p1; p2 lies 16 bytes on, both as floats from 0 to 1
 */
export function drawPair(word: usize, n: i32, N: i32, chance: usize): i32 {
  const one = v128.load(oneTwice);
  const half = v128.load(halfTwice);
  const u = f64x2.mul(
    f64x2.add(f64x2.convert_low_i32x4_u(v128.load64_zero(word)), half),
    v128.load(wordUnit),
  );
  const p = f64x2.promote_low_f32x4(v128.load_lane<f32>(chance + 16, v128.load32_zero(chance), 1));
  // Above a half, count what fails.
  const flipped = f64x2.gt(p, half);
  const q = v128.bitselect(f64x2.sub(one, p), p, flipped);
  const target = v128.bitselect(f64x2.sub(one, u), u, flipped);
  const rest = N - n;
  const trials = i64x2.replace_lane(i64x2.splat(n), 1, rest);
  const base = f64x2.sub(one, q);
  const odds = f64x2.div(q, base);
  const bit = v128.load(bitTwice);
  let probability = one;
  let power = base;
  let bits = trials;
  for (let left = N; ;) {
    probability = f64x2.mul(probability, v128.bitselect(power, one, i64x2.neg(v128.and(bits, bit))));
    left >>= 1;
    if (left == 0) break;
    power = f64x2.mul(power, power);
    bits = i64x2.shr_u(bits, 1);
  }
  let below = probability;
  let count = i64x2.splat(0);
  let ratio1 = ratios + ((<usize>n) << 8);
  let ratio2 = ratios + ((<usize>rest) << 8);
  while (true) {
    const short = v128.bitselect(f64x2.le(below, target), f64x2.lt(below, target), flipped);
    if (!v128.any_true(short)) break;
    count = i64x2.sub(count, short);
    const ratio = v128.load_lane<f64>(ratio2, v128.load64_zero(ratio1), 1);
    ratio1 += 8;
    ratio2 += 8;
    probability = f64x2.mul(probability, f64x2.mul(ratio, odds));
    below = f64x2.add(below, probability);
  }
  const drawn = v128.bitselect(i64x2.sub(trials, count), count, flipped);
  return <i32>(i64x2.extract_lane(drawn, 0) + i64x2.extract_lane(drawn, 1));
}
