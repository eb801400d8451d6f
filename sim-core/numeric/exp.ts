/**
 * e^x from IEEE +, −, ×, ÷ and exact scaling alone, so that every browser and Node give the same bits; `Math.exp` may
 * differ between engines. Method, constants and error bound (under 1 ulp) are those of Sun Microsystems' fdlibm 5.3,
 * `e_exp.c` (1993): reduce x = k ln 2 + s with |s| ≤ ½ ln 2, then a rational approximation of e^s.
 */

const inverseLn2 = 1.4426950408889634;
/** ln 2 split in two, so that k × high is exact */
const ln2High = 6.9314718036912382e-1;
const ln2Low = 1.9082149292705877e-10;
const p1 = 1.6666666666666602e-1;
const p2 = -2.7777777777015593e-3;
const p3 = 6.6137563214379344e-5;
const p4 = -1.6533902205465252e-6;
const p5 = 4.1381367970572385e-8;

const overflow = 709.782712893384;
const underflow = -745.1332191019411;

/** 2^k for k from −1022 to 1023, at index k + 1022: exact, as halving and doubling are. */
const powersOfTwo = new Float64Array(2046);
powersOfTwo[1022] = 1;
for (let k = 1; k <= 1023; k++) powersOfTwo[1022 + k] = powersOfTwo[1021 + k] * 2;
for (let k = 1; k <= 1022; k++) powersOfTwo[1022 - k] = powersOfTwo[1023 - k] / 2;

/** e^x within 1 ulp, the same bits on every machine. */
export function exp(x: number): number {
  if (!(x <= overflow)) return x > overflow ? Infinity : NaN;
  if (x < underflow) return 0;
  const k = Math.floor(inverseLn2 * x + 0.5);
  const high = x - k * ln2High;
  const low = k * ln2Low;
  const s = high - low;
  const square = s * s;
  const c = s - square * (p1 + square * (p2 + square * (p3 + square * (p4 + square * p5))));
  const y = 1 - (low - (s * c) / (2 - c) - high);
  if (k > 1023) return y * 2 * powersOfTwo[1022 + k - 1];
  if (k >= -1021) return y * powersOfTwo[1022 + k];
  return y * powersOfTwo[1022 + k + 100] * powersOfTwo[1022 - 100];
}

/** cosh x, the same bits on every machine. */
export function cosh(x: number): number {
  const e = exp(Math.abs(x));
  return 0.5 * e + 0.5 / e;
}

/** cosh x − 1 without the cancellation near 0: 2 sinh²(x/2), by its series while |x| is small. */
export function coshMinusOne(x: number): number {
  if (Math.abs(x) > 0.5) return cosh(x) - 1;
  const square = x * x;
  let term = square / 2;
  let sum = 0;
  for (let n = 3; term > sum * 1e-18; n += 2) {
    sum += term;
    term *= square / (n * (n + 1));
  }
  return sum;
}

/** 1 − e^(−x) for x ≥ 0, without the cancellation near 0 that would cut off the thin edge of a front. */
export function oneMinusExp(x: number): number {
  if (x > 1e-4) return 1 - exp(-x);
  return x * (1 - (x / 2) * (1 - (x / 3) * (1 - x / 4)));
}
