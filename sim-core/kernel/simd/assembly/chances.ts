import { exp, partOf, rest, scaleOf, shifted } from './exp';
import {
  capacity,
  cover,
  crowding,
  exposure,
  groups,
  lastLanes,
  refuge,
  skipsBare,
  skipsBarren,
  vigour,
  width,
} from './state';
import { held, records, recruitment, wetness } from './stretch';
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
export function weigh(y: i32, from: i32, to: i32): void {
  const crowded = crowding > 0;
  const mayBeBare = skipsBare;
  const mayBeBarren = skipsBarren;
  const row = <usize>y * <usize>width + ((<usize>from) << 2);
  let coverAt = cover + (row << 2);
  let capacityAt = capacity + row;
  let vigourAt = vigour + row;
  let exposureAt = exposure + row;
  let refugeAt = refuge + row;
  const end = records + ((<usize>(to - from)) << 6);

  for (
    let record = records;
    record < end;
    record += 128, coverAt += 32, capacityAt += 8, vigourAt += 8, exposureAt += 8, refugeAt += 8
  ) {
    const around1 = v128.load(record);
    const around2 = v128.load(record, 64);
    if (
      mayBeBare
        ? !v128.any_true(
            v128.or(v128.or(v128.load(coverAt), v128.load(coverAt, 16)), v128.or(around1, around2)),
          )
        : mayBeBarren && load<u64>(capacityAt) == 0
    ) {
      v128.store(record, i64x2.splat(0), held);
      v128.store(record, i64x2.splat(0), held + 64);
      continue;
    }
    const k = v128.load_ext<u8>(capacityAt);
    const M = v128.load_ext<u8>(refugeAt);
    const E = v128.load_ext<u8>(exposureAt);
    const g = v128.load_ext<u8>(vigourAt);
    const K1 = shareOf(lowFloats(k));
    const K2 = shareOf(highFloats(k));
    const M1 = lowFloats(M);
    const M2 = highFloats(M);
    const E1 = lowFloats(E);
    const E2 = highFloats(E);
    // Where K = 0 all that follows is no number; `outcomes.ts` masks it.
    const phi1 = f32x4.div(around1, K1);
    const phi2 = f32x4.div(around2, K2);
    const wet1 = wetnessOf(phi1, E1, M1);
    const wet2 = wetnessOf(phi2, E2, M2);
    let pressure1 = pressureOf(lowFloats(g), M1);
    let pressure2 = pressureOf(highFloats(g), M2);
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
  if (to == groups) v128.store(end - 64, v128.and(v128.load(end - 64, held), lastLanes), held);
}
