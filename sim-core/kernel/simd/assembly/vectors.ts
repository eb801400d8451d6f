/**
 * Vectors of four like floats that the step multiplies and adds with, set before the first step. They lie in memory
 * because V8 puts a vector that the code names together anew wherever it is used, in the innermost loop too; a load is
 * one instruction.
 */
const vectors: usize = memory.data(31 << 4, 16);

export const one = vectors;
export const byteUnit = vectors + (1 << 4);
/** k/255 = k × share + k × shareRest: the first product is exact, so the sum rounds to what fround(k / 255) gives */
export const share = vectors + (2 << 4);
export const shareRest = vectors + (3 << 4);

/** parts of e^x, see `exp.ts` */
export const lowest = vectors + (4 << 4);
export const highest = vectors + (5 << 4);
export const log2e = vectors + (6 << 4);
export const ln2 = vectors + (7 << 4);
export const shifter = vectors + (8 << 4);
export const p2 = vectors + (9 << 4);
export const p3 = vectors + (10 << 4);
export const p4 = vectors + (11 << 4);
export const p5 = vectors + (12 << 4);
export const p6 = vectors + (13 << 4);

/** rates of spread; recruits and growth for each 1/255 of vigour and refuge, signs as in an exponent */
export const carry = vectors + (14 << 4);
export const freed = vectors + (15 << 4);
export const recruitsPerByte = vectors + (16 << 4);
export const growthPerByte = vectors + (17 << 4);
export const seeds = vectors + (18 << 4);
export const crowd = vectors + (19 << 4);

/** rates of loss; shifts of the drought index in widths of the loss curve, for each 1/255 */
export const drought = vectors + (20 << 4);
export const background = vectors + (21 << 4);
export const minusYears = vectors + (22 << 4);
export const exposurePerByte = vectors + (23 << 4);
export const refugePerByte = vectors + (24 << 4);
export const relief = vectors + (25 << 4);
/** (X − X0), in widths of the loss curve: set anew for each step */
export const calm = vectors + (26 << 4);

/** pairs of doubles, for the draws */
export const oneTwice = vectors + (27 << 4);
export const halfTwice = vectors + (28 << 4);
export const wordUnit = vectors + (29 << 4);
export const bitTwice = vectors + (30 << 4);

export function set(vector: usize, value: f64): void {
  v128.store(vector, f32x4.splat(<f32>value));
}

/** Those that no rate changes. */
export function setConstants(): void {
  set(one, 1);
  set(byteUnit, 1.0 / 255);
  set(share, 0.0039215087890625);
  set(shareRest, 5.983839201917363e-8);
  set(lowest, -87);
  set(highest, 88);
  set(log2e, 1.44269504088896341);
  set(ln2, 0.693147180559945309);
  set(shifter, 12582912);
  set(p2, 0.5);
  set(p3, 0.16666576266288757);
  set(p4, 0.04166655242443085);
  set(p5, 0.00836323294788599);
  set(p6, 0.0013926250394433737);
  v128.store(oneTwice, f64x2.splat(1));
  v128.store(halfTwice, f64x2.splat(0.5));
  v128.store(wordUnit, f64x2.splat(2.3283064365386963e-10));
  v128.store(bitTwice, i64x2.splat(1));
}
