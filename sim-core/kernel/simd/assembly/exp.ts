/**
 * e^x and e^x − 1 of four floats. Method and polynomial are those of Cephes' `expf` (Moshier 1989, Cephes Mathematical
 * Library, single/expf.c): x = n ln 2 + r with |r| ≤ ½ ln 2, then e^r − 1 = r + r² P(r), within 2e−7 of its value.
 * Only +, −, × and whole-number shifts: the same bits on every machine.
 *
 * Both functions of x share its parts: scale = 2^n and part = e^r − 1, so that
 * e^x = scale + scale × part and e^x − 1 = (scale − 1) + scale × part, the latter without cancellation near 0.
 */

/** 1.5 × 2^23: adding it leaves the nearest whole number in the low bits */
const shifter: f32 = 12582912.0;

/** x within what keeps 2^n an ordinary number */
export function within(x: v128): v128 {
  return f32x4.pmin(f32x4.pmax(x, f32x4.splat(-87.0)), f32x4.splat(88.0));
}

/** n as the low bits of a float, from x within its limits */
export function shifted(x: v128): v128 {
  return f32x4.add(f32x4.mul(x, f32x4.splat(1.44269504088896341)), f32x4.splat(shifter));
}

/** 2^n, from what `shifted` gave */
export function scaleOf(bits: v128): v128 {
  return i32x4.add(i32x4.shl(bits, 23), i32x4.splat(0x3f800000));
}

/** r = x − n ln 2, with ln 2 in two parts so that the larger product is exact */
export function rest(x: v128, bits: v128): v128 {
  const n = f32x4.sub(bits, f32x4.splat(shifter));
  return f32x4.sub(
    f32x4.sub(x, f32x4.mul(n, f32x4.splat(0.693359375))),
    f32x4.mul(n, f32x4.splat(-2.1219444e-4)),
  );
}

/** e^r − 1 for |r| ≤ ½ ln 2 */
export function partOf(r: v128): v128 {
  let p = f32x4.add(f32x4.mul(f32x4.splat(1.98756915e-4), r), f32x4.splat(1.3981999507e-3));
  p = f32x4.add(f32x4.mul(p, r), f32x4.splat(8.3334519073e-3));
  p = f32x4.add(f32x4.mul(p, r), f32x4.splat(4.1665795894e-2));
  p = f32x4.add(f32x4.mul(p, r), f32x4.splat(1.6666665459e-1));
  p = f32x4.add(f32x4.mul(p, r), f32x4.splat(5.0000001201e-1));
  return f32x4.add(f32x4.mul(p, f32x4.mul(r, r)), r);
}

/** e^x */
export function exp(x: v128): v128 {
  const held = within(x);
  const bits = shifted(held);
  const scale = scaleOf(bits);
  return f32x4.add(scale, f32x4.mul(scale, partOf(rest(held, bits))));
}
