import { partOf, rest, scaleOf, shifted } from './exp';
import { calmRow, grazed, grazingRow, lostToGrazers } from './grazers';
import {
  alive,
  backgroundLoss,
  bitStride,
  counts,
  cover,
  droughtLoss,
  groups,
  lastLanes,
  lostRow,
  skipsBare,
  width,
} from './state';
import {
  free,
  held,
  pieceCount,
  pieceFrom,
  pieceTo,
  records,
  recruitment,
  standing,
  wetness,
} from './stretch';
import { markWhere } from './runs';
import * as vectors from './vectors';

/**
 * The share S that comes through, of the groups of the stretch, in row y, after `weigh`, and what is lost. Mean-field: the
 * next state. Counts: the chances of standing and of free sites, for the draws.
 */
export function comeThrough(y: i32): void {
  const eaten = grazed;
  const manyCauses = droughtLoss > 0 && (backgroundLoss > 0 || eaten);
  const draws = counts;
  const mayBeBare = skipsBare;
  const coverRow = cover + ((<usize>y * <usize>width) << 2);
  const last = groups - 1;
  let lanes = i32x4.splat(-1);
  let lost = v128.load(lostRow);
  let lostToDrought = v128.load(lostRow, 16);

  // Hazard by all but drought: one for all cells, unless grazers make it differ.
  const calm = eaten ? calmRow : vectors.background;
  const ofGroup: usize = eaten ? 16 : 0;
  let record = records;
  for (let piece = 0; piece < pieceCount; piece++) {
    const from = pieceFrom(piece);
    const to = pieceTo(piece);
    /** bit i: something stands in group `from` + i */
    let living: u64 = 0;
    for (let g = from; g < to; g++, record += 64) {
      const at = (<usize>g) << 4;
      if (g == last) lanes = lastLanes;
      const K = v128.load(record, held);
      if (!v128.any_true(K)) {
        if (draws) v128.store(record, K, free);
        continue;
      }
      const holds = f32x4.gt(K, i64x2.splat(0));
      const one = v128.load(vectors.one);
      const q = v128.load(record, recruitment);
      const hazard = f32x4.div(v128.load(vectors.drought), f32x4.add(one, v128.load(record, wetness)));
      const total = f32x4.add(v128.load(calm + <usize>g * ofGroup), hazard);
      const h = f32x4.pmax(v128.load(vectors.lowest), f32x4.mul(total, v128.load(vectors.minusYears)));
      const bits = shifted(h);
      const scale = scaleOf(bits);
      const part = f32x4.mul(scale, partOf(rest(h, bits)));
      const S = f32x4.add(scale, part);

      const c = v128.load(coverRow + at);
      const carry = v128.load(vectors.carry);
      const kept = f32x4.mul(carry, c);
      const before = f32x4.add(kept, f32x4.mul(f32x4.sub(K, kept), q));
      const gone = v128.and(f32x4.mul(before, f32x4.sub(f32x4.sub(one, scale), part)), holds);
      lost = f32x4.add(lost, gone);
      if (manyCauses)
        lostToDrought = f32x4.add(lostToDrought, v128.and(f32x4.mul(gone, f32x4.div(hazard, total)), holds));
      if (eaten) {
        const grazing = v128.and(f32x4.mul(gone, f32x4.div(v128.load(grazingRow + at), total)), holds);
        v128.store(lostToGrazers, f32x4.add(v128.load(lostToGrazers), grazing));
      }
      if (draws) {
        const stays = f32x4.add(carry, f32x4.mul(v128.load(vectors.freed), q));
        v128.store(record, v128.and(f32x4.mul(S, q), holds), free);
        v128.store(record, f32x4.mul(S, stays), standing);
        continue;
      }
      const next = v128.and(f32x4.pmin(K, f32x4.mul(S, before)), holds);
      // What lies behind the end of a row is the next one, and stays.
      v128.store(coverRow + at, v128.or(next, v128.andnot(c, lanes)));
      living |= (<u64>v128.any_true(next)) << (g - from);
    }
    if (mayBeBare) markWhere(alive + <usize>y * bitStride, from, living);
  }
  v128.store(lostRow, lost);
  v128.store(lostRow, lostToDrought, 16);
}
