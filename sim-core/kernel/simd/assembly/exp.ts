import { highest, ln2, log2e, lowest, one, p2, p3, p4, p5, p6, shifter } from './vectors';

/**
 * e^x and e^x − 1 of four floats, by the usual reduction (Cody & Waite 1980, Software Manual for the Elementary
 * Functions, chapter 6): x = n ln 2 + r with |r| ≤ ½ ln 2, then e^r − 1 = r + r² P(r), with P of degree 4 that meets
 * (e^r − 1 − r)/r² at the Chebyshev nodes; within 1e−7 of its value. Only +, −, × and shifts of whole numbers: the same
 * bits on every machine.
 *
 * Functions of x share its parts: with scale = 2^n and part = e^r − 1, e^x = scale + scale × part, and
 * e^x − 1 = (scale − 1) + scale × part, the latter without cancellation near 0.
 */

/** n in the low bits of a float, by adding 1.5 × 2^23; for x from −87 to 88, where 2^n is an ordinary number */
export function shifted(x: v128): v128 {
  return f32x4.add(f32x4.mul(x, v128.load(log2e)), v128.load(shifter));
}

/** 2^n, from what `shifted` gave: n goes to the exponent of 1 */
export function scaleOf(bits: v128): v128 {
  return i32x4.add(i32x4.shl(bits, 23), v128.load(one));
}

/** r = x − n ln 2. In one part: what n ln 2 loses in rounding is no more than what x has lost. */
export function rest(x: v128, bits: v128): v128 {
  return f32x4.sub(x, f32x4.mul(f32x4.sub(bits, v128.load(shifter)), v128.load(ln2)));
}

/** e^r − 1 for |r| ≤ ½ ln 2 */
export function partOf(r: v128): v128 {
  const square = f32x4.mul(r, r);
  const low = f32x4.add(v128.load(p2), f32x4.mul(v128.load(p3), r));
  const high = f32x4.add(v128.load(p4), f32x4.mul(v128.load(p5), r));
  const p = f32x4.add(low, f32x4.mul(square, f32x4.add(high, f32x4.mul(v128.load(p6), square))));
  return f32x4.add(f32x4.mul(p, square), r);
}

/** e^x; beyond −87 and 88 that of the bound */
export function exp(x: v128): v128 {
  const held = f32x4.pmin(f32x4.pmax(x, v128.load(lowest)), v128.load(highest));
  const bits = shifted(held);
  const scale = scaleOf(bits);
  return f32x4.add(scale, f32x4.mul(scale, partOf(rest(held, bits))));
}
