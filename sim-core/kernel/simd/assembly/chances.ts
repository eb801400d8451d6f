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

/** Four bytes as floats. */
function floats(bytes: usize): v128 {
  return f32x4.convert_i32x4_s(i32x4.extend_low_i16x8_u(i16x8.extend_low_i8x16_u(v128.load32_zero(bytes))));
}

/**
 * What the chances of groups `from` up to `to` of row y hang on, four cells at a time: K, recruitment q, and
 * e^((X − X^c)/ω). K = 0 marks what is left out. `outcomes.ts` goes on from here: in two loops, because one
 * would have more steps that wait for one another than a processor looks ahead.
 */
export function weigh(y: i32, from: i32, to: i32): void {
  const crowded = crowding > 0;
  const mayBeBare = skipsBare;
  const mayBeBarren = skipsBarren;
  const row = <usize>y * <usize>width;
  const coverRow = cover + (row << 2);
  const capacityRow = capacity + row;
  const vigourRow = vigour + row;
  const exposureRow = exposure + row;
  const refugeRow = refuge + row;

  let record = records;
  for (let g = from; g < to; g++, record += 64) {
    const at = (<usize>g) << 2;
    const around = v128.load(record);
    if (
      mayBeBare
        ? !v128.any_true(v128.or(v128.load(coverRow + (at << 2)), around))
        : mayBeBarren && load<u32>(capacityRow + at) == 0
    ) {
      v128.store(record, i64x2.splat(0), held);
      continue;
    }
    const one = v128.load(vectors.one);
    const k = floats(capacityRow + at);
    const K = f32x4.add(f32x4.mul(k, v128.load(vectors.share)), f32x4.mul(k, v128.load(vectors.shareRest)));
    v128.store(record, K, held);
    const M = floats(refugeRow + at);
    const E = floats(exposureRow + at);

    // Where K = 0 all that follows is no number; `outcomes.ts` masks it.
    const phi = f32x4.div(around, K);
    const phi1 = f32x4.pmin(one, phi);

    // X − X^c, in widths of the loss curve
    const margin = f32x4.add(
      f32x4.sub(
        f32x4.add(v128.load(vectors.calm), f32x4.mul(v128.load(vectors.refugePerByte), M)),
        f32x4.mul(v128.load(vectors.exposurePerByte), E),
      ),
      f32x4.mul(v128.load(vectors.relief), phi1),
    );
    v128.store(record, exp(margin), wetness);

    // q = 1 − e^x
    let pressure = f32x4.mul(
      f32x4.mul(v128.load(vectors.recruitsPerByte), floats(vigourRow + at)),
      f32x4.add(one, f32x4.mul(v128.load(vectors.growthPerByte), M)),
    );
    if (crowded) {
      const open = f32x4.sub(one, f32x4.mul(E, v128.load(vectors.byteUnit)));
      pressure = f32x4.mul(pressure, exp(f32x4.mul(f32x4.mul(v128.load(vectors.crowd), open), phi1)));
    }
    const x = f32x4.pmax(
      v128.load(vectors.lowest),
      f32x4.sub(f32x4.mul(pressure, phi), v128.load(vectors.seeds)),
    );
    const bits = shifted(x);
    const scale = scaleOf(bits);
    const part = f32x4.mul(scale, partOf(rest(x, bits)));
    v128.store(record, f32x4.sub(f32x4.sub(one, scale), part), recruitment);
  }
  // What lies behind the end of a row is the next one.
  if (to == groups) v128.store(record - 64, v128.and(v128.load(record - 64, held), lastLanes), held);
}
