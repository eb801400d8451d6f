import { exp, partOf, rest, scaleOf, shifted } from './exp';
import {
  crowding,
  groups,
  lastLanes,
  skipsBarren,
} from './state';
import { held, pieceCount, pieceTo, records, recruitment, wetness } from './stretch';
import * as vectors from './vectors';

/** The first four of eight 16-bit numbers as floats, and the last four. */
function lowFloats(numbers: v128): v128 {
  return f32x4.convert_i32x4_s(i32x4.extend_low_i16x8_u(numbers));
}
function highFloats(numbers: v128): v128 {
  return f32x4.convert_i32x4_s(i32x4.extend_high_i16x8_u(numbers));
}

/** K of capacity bytes */
function shareOf(k: v128): v128 {
  return f32x4.add(f32x4.mul(k, v128.load(vectors.share)), f32x4.mul(k, v128.load(vectors.shareRest)));
}

/** e^((X − X^c)/ω); a call would cost a twentieth of the step */
// @ts-ignore: AssemblyScript's decorator; TypeScript knows none on functions
@inline
function wetnessOf(phi: v128, E: v128, M: v128): v128 {
  return exp(
    f32x4.add(
      f32x4.sub(
        f32x4.add(v128.load(vectors.calm), f32x4.mul(v128.load(vectors.refugePerByte), M)),
        f32x4.mul(v128.load(vectors.exposurePerByte), E),
      ),
      f32x4.mul(v128.load(vectors.relief), f32x4.pmin(v128.load(vectors.one), phi)),
    ),
  );
}

/** −β g (1 + b_M M) */
function pressureOf(g: v128, M: v128): v128 {
  return f32x4.mul(
    f32x4.mul(v128.load(vectors.recruitsPerByte), g),
    f32x4.add(v128.load(vectors.one), f32x4.mul(v128.load(vectors.growthPerByte), M)),
  );
}

/** e^(−κ(1 − E)φ₁) */
function crowdingOf(phi: v128, E: v128): v128 {
  const one = v128.load(vectors.one);
  const open = f32x4.sub(one, f32x4.mul(E, v128.load(vectors.byteUnit)));
  return exp(f32x4.mul(f32x4.mul(v128.load(vectors.crowd), open), f32x4.pmin(one, phi)));
}

/** q = 1 − e^(pressure φ − ε Δt) */
function recruitmentOf(pressure: v128, phi: v128): v128 {
  const x = f32x4.pmax(
    v128.load(vectors.lowest),
    f32x4.sub(f32x4.mul(pressure, phi), v128.load(vectors.seeds)),
  );
  const bits = shifted(x);
  const scale = scaleOf(bits);
  return f32x4.sub(f32x4.sub(v128.load(vectors.one), scale), f32x4.mul(scale, partOf(rest(x, bits))));
}

/**
 * What the chances of groups `from` up to `to` (one stretch) of row y hang on: K, recruitment q, and e^((X − X^c)/ω).
 * K = 0 marks what is left out. `outcomes.ts` goes on from here: in two loops, because in one more steps would wait for
 * one another than a processor looks ahead. Two groups at a time, so that each constant is fetched half as often; an odd
 * last one has a companion whose record nobody reads.
 */
export function weigh(many: i32): void {
  const crowded = crowding > 0;
  const mayBeBarren = skipsBarren;
  for (let i = 0, record = records; i < many; i += 2, record += 128) {
    const around1 = v128.load(record);
    const around2 = v128.load(record, 64);
    const ground1 = v128.load(record, held);
    const ground2 = v128.load(record, held + 64);
    if (mayBeBarren && i32x4.extract_lane(v128.or(ground1, ground2), 0) == 0) {
      v128.store(record, i64x2.splat(0), held);
      v128.store(record, i64x2.splat(0), held + 64);
      continue;
    }
    const growth1 = i16x8.extend_low_i8x16_u(ground1);
    const growth2 = i16x8.extend_low_i8x16_u(ground2);
    const strain1 = i16x8.extend_high_i8x16_u(ground1);
    const strain2 = i16x8.extend_high_i8x16_u(ground2);
    const K1 = shareOf(lowFloats(growth1));
    const K2 = shareOf(lowFloats(growth2));
    const M1 = highFloats(strain1);
    const M2 = highFloats(strain2);
    const E1 = lowFloats(strain1);
    const E2 = lowFloats(strain2);
    // Where K = 0 all that follows is no number; `outcomes.ts` masks it.
    const phi1 = f32x4.div(around1, K1);
    const phi2 = f32x4.div(around2, K2);
    const wet1 = wetnessOf(phi1, E1, M1);
    const wet2 = wetnessOf(phi2, E2, M2);
    let pressure1 = pressureOf(highFloats(growth1), M1);
    let pressure2 = pressureOf(highFloats(growth2), M2);
    if (crowded) {
      pressure1 = f32x4.mul(pressure1, crowdingOf(phi1, E1));
      pressure2 = f32x4.mul(pressure2, crowdingOf(phi2, E2));
    }
    const q1 = recruitmentOf(pressure1, phi1);
    const q2 = recruitmentOf(pressure2, phi2);
    v128.store(record, K1, held);
    v128.store(record, K2, held + 64);
    v128.store(record, wet1, wetness);
    v128.store(record, wet2, wetness + 64);
    v128.store(record, q1, recruitment);
    v128.store(record, q2, recruitment + 64);
  }
  // What lies behind the end of a row is the next one.
  if (pieceTo(pieceCount - 1) == groups) {
    const last = records + ((<usize>(many - 1)) << 6);
    v128.store(last, v128.and(v128.load(last, held), lastLanes), held);
  }
}
