import { exp, partOf, rest, scaleOf, shifted } from './exp';
import {
  alive,
  backgroundLoss,
  capacity,
  carryOver,
  counts,
  cover,
  crowding,
  droughtLoss,
  exposure,
  exposureShift,
  flagStride,
  free,
  groups,
  heard,
  lastLanes,
  lossWidth,
  lostRow,
  neighbourShift,
  recruits,
  refuge,
  refugeGrowth,
  refugeShift,
  seedlings,
  skipsBare,
  skipsBarren,
  standing,
  tolerance,
  vigour,
  width,
  years,
} from './state';

/** Four bytes as floats. */
function floats(bytes: usize): v128 {
  return f32x4.convert_i32x4_s(i32x4.extend_low_i16x8_u(i16x8.extend_low_i8x16_u(v128.load32_zero(bytes))));
}

/**
 * Recruitment q and the share S that comes through, of groups `from` up to `to` of row y, four cells at a time, and what
 * is lost of them. Mean-field: the next state. Counts: the chances of standing and of free sites, for the draws.
 */
export function weigh(y: i32, from: i32, to: i32, droughtIndex: f64): void {
  const byteUnit: f32 = 1.0 / 255.0;
  const one = f32x4.splat(1);
  const least = f32x4.splat(-87);
  // k/255 as a 16-bit part, whose product with a byte is exact, and the rest: rounds to what fround(k / 255) gives.
  const unit = f32x4.splat(0.0039215087890625);
  const unitRest = f32x4.splat(5.983839201917363e-8);
  const recruitsPerByte = f32x4.splat(-recruits * byteUnit);
  const growthPerByte = f32x4.splat(refugeGrowth * byteUnit);
  const crowded = crowding > 0;
  const seeds = f32x4.splat(seedlings);
  const calm = f32x4.splat(<f32>((droughtIndex - tolerance) / lossWidth));
  const exposurePerByte = f32x4.splat(exposureShift * byteUnit);
  const refugePerByte = f32x4.splat(refugeShift * byteUnit);
  const relief = f32x4.splat(neighbourShift);
  const drought = f32x4.splat(droughtLoss);
  const background = f32x4.splat(backgroundLoss);
  const step = f32x4.splat(-years);
  const carry = f32x4.splat(carryOver);
  const freed = f32x4.splat(1 - carryOver);
  const loses = droughtLoss > 0 || backgroundLoss > 0;
  const twoCauses = droughtLoss > 0 && backgroundLoss > 0;
  const columns = <usize>width;
  const flags = alive + <usize>y * flagStride;
  let lost = v128.load(lostRow);
  let lostToDrought = v128.load(lostRow, 16);

  for (let g = from; g < to; g++) {
    const cell = <usize>y * columns + ((<usize>g) << 2);
    const c = v128.load(cover + (cell << 2));
    const around = v128.load(heard + (g << 4));
    if (
      (skipsBarren && load<u32>(capacity + cell) == 0) ||
      (skipsBare && !v128.any_true(v128.or(c, around)))
    ) {
      if (counts) v128.store(free + (g << 4), i64x2.splat(0));
      if (skipsBare) store<u8>(flags + g, 0);
      continue;
    }
    const k = floats(capacity + cell);
    const K = f32x4.add(f32x4.mul(k, unit), f32x4.mul(k, unitRest));
    const lanes = g + 1 == groups ? lastLanes : i32x4.splat(-1);
    const holds = v128.and(f32x4.gt(K, i64x2.splat(0)), lanes);
    const M = floats(refuge + cell);
    const E = floats(exposure + cell);

    // q = 1 − e^x; where K = 0 all that follows is no number, and is masked.
    const phi = f32x4.div(around, K);
    const phi1 = f32x4.pmin(one, phi);
    let pressure = f32x4.mul(
      f32x4.mul(recruitsPerByte, floats(vigour + cell)),
      f32x4.add(one, f32x4.mul(growthPerByte, M)),
    );
    if (crowded)
      pressure = f32x4.mul(
        pressure,
        exp(
          f32x4.mul(
            f32x4.mul(f32x4.splat(-crowding), f32x4.sub(one, f32x4.mul(E, f32x4.splat(byteUnit)))),
            phi1,
          ),
        ),
      );
    const x = f32x4.pmax(least, f32x4.sub(f32x4.mul(pressure, phi), seeds));
    const xBits = shifted(x);
    const xScale = scaleOf(xBits);
    const q = f32x4.sub(f32x4.sub(one, xScale), f32x4.mul(xScale, partOf(rest(x, xBits))));

    // X − X^c, in widths of the loss curve
    const margin = f32x4.add(
      f32x4.sub(f32x4.add(calm, f32x4.mul(refugePerByte, M)), f32x4.mul(exposurePerByte, E)),
      f32x4.mul(relief, phi1),
    );
    const hazard = f32x4.div(drought, f32x4.add(one, exp(margin)));
    const total = f32x4.add(background, hazard);
    const h = f32x4.pmax(least, f32x4.mul(total, step));
    const hBits = shifted(h);
    const hScale = scaleOf(hBits);
    const hPart = f32x4.mul(hScale, partOf(rest(h, hBits)));
    const S = f32x4.add(hScale, hPart);

    const kept = f32x4.mul(carry, c);
    const before = f32x4.add(kept, f32x4.mul(f32x4.sub(K, kept), q));
    if (loses) {
      const gone = v128.and(f32x4.mul(before, f32x4.sub(f32x4.sub(one, hScale), hPart)), holds);
      lost = f32x4.add(lost, gone);
      if (twoCauses)
        lostToDrought = f32x4.add(lostToDrought, v128.and(f32x4.mul(gone, f32x4.div(hazard, total)), holds));
    }
    if (counts) {
      v128.store(free + (g << 4), v128.and(f32x4.mul(S, q), holds));
      v128.store(standing + (g << 4), f32x4.mul(S, f32x4.add(carry, f32x4.mul(freed, q))));
      continue;
    }
    const next = v128.and(f32x4.pmin(K, f32x4.mul(S, before)), holds);
    v128.store(cover + (cell << 2), v128.bitselect(next, c, lanes));
    if (skipsBare) store<u8>(flags + g, <u8>v128.any_true(next));
  }
  v128.store(lostRow, lost);
  v128.store(lostRow, lostToDrought, 16);
}
