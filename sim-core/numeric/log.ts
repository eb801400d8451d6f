/**
 * Natural logarithm from IEEE +, −, ×, ÷ and bit operations alone (see `exp.ts`). Method, constants and error bound
 * (under 1 ulp) are those of Sun Microsystems' fdlibm 5.3, `e_log.c` (1993): x = 2^k (1 + f) with √½ < 1 + f < √2,
 * then a polynomial in s² with s = f/(2 + f).
 */

const ln2High = 6.9314718036912382e-1;
const ln2Low = 1.9082149292705877e-10;
const lg1 = 6.666666666666735e-1;
const lg2 = 3.999999999940942e-1;
const lg3 = 2.857142874366239e-1;
const lg4 = 2.2222198432149784e-1;
const lg5 = 1.818357216161805e-1;
const lg6 = 1.5313837699209373e-1;
const lg7 = 1.4798198605116586e-1;

const scratch = new DataView(new ArrayBuffer(8));

/** ln x within 1 ulp, the same bits on every machine; −Infinity at 0, NaN below. */
export function log(x: number): number {
  if (!(x > 0)) return x === 0 ? -Infinity : NaN;
  if (x === Infinity) return Infinity;
  let k = 0;
  if (x < 2.2250738585072014e-308) {
    k = -54;
    x *= 18014398509481984; // 2^54: out of the subnormal numbers
  }
  scratch.setFloat64(0, x);
  let high = scratch.getInt32(0);
  k += (high >> 20) - 1023;
  high &= 0x000fffff;
  const carry = (high + 0x95f64) & 0x100000;
  scratch.setInt32(0, high | (carry ^ 0x3ff00000));
  k += carry >> 20;
  const f = scratch.getFloat64(0) - 1;
  if (f === 0) return k * ln2High + k * ln2Low;
  const s = f / (2 + f);
  const z = s * s;
  const w = z * z;
  const r = z * (lg1 + w * (lg3 + w * (lg5 + w * lg7))) + w * (lg2 + w * (lg4 + w * lg6));
  const half = 0.5 * f * f;
  return k * ln2High - (half - (s * (half + r) + k * ln2Low) - f);
}
