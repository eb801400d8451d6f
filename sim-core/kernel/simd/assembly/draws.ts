import { binomialQuantile, drawPair, fewSites } from './binomial';
import { groundOf } from './ground';
import { philox } from './philox';
import { markWhere } from './runs';
import {
  alive,
  bitStride,
  clumps,
  cover,
  key0,
  key1,
  replicate,
  shares,
  sites,
  skipsBare,
  wide,
  width,
} from './state';
import { free, pieceCount, pieceFrom, pieceTo, records, standing } from './stretch';

/** the random words of one stretch: two a cell, from the first cell of a counter on */
export const words: usize = memory.data((64 << 5) + 128, 16);

/** A word as a number strictly between 0 and 1: (word + ½) / 2³². */
function uniform(word: usize): f64 {
  return (<f64>load<u32>(word) + 0.5) * 2.3283064365386963e-10;
}

/** Draws the next state of the groups of the stretch, in row y, from the chances that `comeThrough` left. */
export function draw(y: i32, step: u32): void {
  let record = records;
  for (let piece = 0; piece < pieceCount; piece++) {
    const from = pieceFrom(piece);
    const to = pieceTo(piece);
    drawPiece(y, from, to, record, step);
    record += (<usize>(to - from)) << 6;
  }
}

/** The same for groups `from` up to `to`; `record` is that of the first. */
function drawPiece(y: i32, from: i32, to: i32, record: usize, step: u32): void {
  const row = <usize>y * <usize>width;
  const first = row + ((<usize>from) << 2);
  const end = row + <usize>min(to << 2, width);
  // Two cells share a counter, four counters are drawn at once.
  const pair = <u32>(first >> 1);
  for (let at = pair, out = words; (<usize>at) << 1 < end; at += 4, out += 64)
    philox(out, at, step, replicate, key0, key1);
  const luck = words - ((<usize>pair) << 4);

  let ground = groundOf(y) + ((<usize>from) << 6);
  /** bit i: something stands in group `from` + i */
  let found: u64 = 0;
  let mark: u64 = 1;
  for (let group = first; group < end; group += 4) {
    let living = 0;
    const beyond = min(group + 4, end);
    let byteAt = ground;
    let lane = record;
    for (let cell = group; cell < beyond; cell++, byteAt++, lane += 4) {
      const byte = <usize>load<u8>(byteAt);
      const N = load<i32>(sites + (byte << 2));
      if (N <= 0) continue;
      const n = wide ? load<i32>(clumps + (cell << 2)) : <i32>load<u16>(clumps + (cell << 1));
      const chance = load<f32>(lane, free);
      if (n == 0 && !(chance > 0)) continue;
      const word = luck + (cell << 3);
      const next =
        N <= fewSites
          ? drawPair(word, n, N, lane + standing)
          : binomialQuantile(uniform(word), n, <f64>load<f32>(lane, standing)) +
            binomialQuantile(uniform(word + 4), N - n, <f64>chance);
      if (next != n) {
        if (wide) store<i32>(clumps + (cell << 2), next);
        else store<u16>(clumps + (cell << 1), <u16>next);
        store<f32>(cover + (cell << 2), <f32>(load<f64>(shares + (byte << 3)) * (<f64>next / <f64>N)));
      }
      living |= next;
    }
    if (living != 0) found |= mark;
    mark <<= 1;
    ground += 64;
    record += 64;
  }
  if (skipsBare) markWhere(alive + <usize>y * bitStride, from, found);
}
