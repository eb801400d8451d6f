import { exp } from './exp';
import { groundOf } from './ground';
import { mirrored } from './neighbourhood';
import { clear, copy } from './runs';
import {
  backgroundLoss,
  claim,
  groups,
  height,
  lastLanes,
  lostRow,
  mirror,
  room,
  rowBytes,
  width,
} from './state';
import { held, pieceCount, pieceFrom, pieceTo, records } from './stretch';
import * as vectors from './vectors';

/** Grazers: their map, and what they do to a row of plants. Where there are none, nothing here is laid out or called. */
export let grazed: bool = false;
export let grazers: usize = 0;
export let fence: usize = 0;
/** f32 weight of each distance of T_G */
export let grazerTaps: usize = 0;
/** loss hazard of each cell of the present row: by grazing, and by all but drought */
export let grazingRow: usize = 0;
export let calmRow: usize = 0;
/** ΣC lost to grazing in the present row, four lanes */
export let lostToGrazers: usize = 0;

let reach: i32 = 0;
/** ring of rows that are spread along themselves; one more behind them is never written and stays 0 */
let slots: i32 = 0;
let ring: usize = 0;
/** cell 0 of one row of G with room for its boundary on both sides */
let padded: usize = 0;
/** Δt f φ₁ of each cell of the present row */
let plenty: usize = 0;
let spread: i32 = 0;

/** α/255, and the limits of G, four like floats each, as in `vectors.ts` */
const own: usize = memory.data(8 << 4, 16);
const ratePerByte = own;
const growth = own + (1 << 4);
const decline = own + (2 << 4);
const refugeLossPerByte = own + (3 << 4);
const arrivals = own + (4 << 4);
const limit = own + (5 << 4);
const allBytes = own + (6 << 4);
/** a hazard too small to lose anything, so that shares of the whole are always numbers */
const leastHazard = own + (7 << 4);

/** Lays out the grazers behind the map; false where the machine does not give that much memory. */
export function layOutGrazers(radius: i32): bool {
  grazed = true;
  reach = radius;
  slots = <i32>Math.min(height, 2 * reach + 1);
  const cells = <usize>width * <usize>height;
  grazers = room(cells << 2);
  fence = room(cells);
  ring = room(<usize>(slots + 1) * rowBytes);
  const side = (reach + 3) & ~3;
  padded = room(<usize>((side << 1) << 2) + rowBytes) + (side << 2);
  grazingRow = room(rowBytes);
  calmRow = room(rowBytes);
  plenty = room(rowBytes);
  grazerTaps = room((reach + 1) << 2);
  lostToGrazers = room(16);
  return claim();
}

/** Rates of grazers as they act in one step; `eats` is α, in hazard a year. */
export function setGrazers(eats: f64, masses: f64, refugeLoss: f64, comeIn: f64, most: f64): void {
  vectors.set(ratePerByte, eats / 255);
  vectors.set(growth, masses);
  vectors.set(refugeLossPerByte, refugeLoss / 255);
  vectors.set(arrivals, comeIn);
  vectors.set(limit, most);
  vectors.set(allBytes, 255);
  vectors.set(leastHazard, 1e-30);
}

/** Before the rows of a step: −Δt (m + p (1 − D)). */
export function startGrazers(ofStep: f64): void {
  vectors.set(decline, ofStep);
  spread = 0;
}

/** Four bytes as floats. */
function floats(at: usize): v128 {
  const short = i16x8.extend_low_i8x16_u(v128.load32_zero(at));
  return f32x4.convert_i32x4_s(i32x4.extend_low_i16x8_u(short));
}

/** Before the plants of row y: spreads G as far as this row hears, and says what hazard each cell stands under. */
export function visit(y: i32): void {
  for (const last = min(height - 1, y + reach); spread <= last; spread++) spreadRow(spread);
  clear(plenty, rowBytes);
  v128.store(lostToGrazers, i64x2.splat(0));
  const row = <usize>y * <usize>width;
  const background = f32x4.splat(<f32>backgroundLoss);
  const rate = v128.load(ratePerByte);
  for (let g = 0; g < groups; g++) {
    const at = (<usize>g) << 4;
    const open = f32x4.sub(v128.load(allBytes), floats(fence + row + (at >> 2)));
    const hazard = f32x4.mul(f32x4.mul(rate, open), v128.load(grazers + (row << 2) + at));
    v128.store(grazingRow + at, hazard);
    v128.store(calmRow + at, f32x4.pmax(v128.load(leastHazard), f32x4.add(background, hazard)));
  }
}

/** Keeps how well the groups of the stretch feed grazers, after `weigh`: Δt f φ₁. */
export function feed(): void {
  const full = v128.load(vectors.one);
  const masses = v128.load(growth);
  let record = records;
  for (let piece = 0; piece < pieceCount; piece++)
    for (let g = pieceFrom(piece), to = pieceTo(piece); g < to; g++, record += 64) {
      const K = v128.load(record, held);
      const phi1 = f32x4.pmin(full, f32x4.div(v128.load(record), K));
      const holds = f32x4.gt(K, i64x2.splat(0));
      v128.store(plenty + ((<usize>g) << 4), v128.and(f32x4.mul(masses, phi1), holds));
    }
}

/** After the plants of row y: G' = min(G_max, (T_G * G) e^(Δt (f φ₁ − m − p (1 − D) − p_M M)) + ι Δt), in place. */
export function moveOn(y: i32): void {
  // The hazards of this row are reckoned with: their room serves for the sums.
  const sums = calmRow;
  startSums(sums, rowAt(y));
  for (let d = 1; d <= reach; d++) addPair(sums, rowAt(y - d), rowAt(y + d), d);
  const row = <usize>y * <usize>width;
  const refuges = groundOf(y) + 12;
  const cells = grazers + (row << 2);
  const last = groups - 1;
  for (let g = 0; g < groups; g++) {
    const at = (<usize>g) << 4;
    const sum = v128.load(sums + at);
    const refugeLoss = f32x4.mul(v128.load(refugeLossPerByte), floats(refuges + (at << 2)));
    const change = exp(f32x4.sub(f32x4.add(v128.load(plenty + at), v128.load(decline)), refugeLoss));
    const next = f32x4.pmin(v128.load(limit), f32x4.add(f32x4.mul(sum, change), v128.load(arrivals)));
    // What lies behind the end of a row is the next one, and stays.
    if (g < last) v128.store(cells + at, next);
    else v128.store(cells + at, v128.bitselect(next, v128.load(cells + at), lastLanes));
  }
}

/** Spreads row y along itself into its slot of the ring. Weights of equal distance are summed before they are weighed. */
function spreadRow(y: i32): void {
  const cells = grazers + ((<usize>y * <usize>width) << 2);
  const out = ring + <usize>(y % slots) * rowBytes;
  copy(padded, cells, width << 2);
  for (let d = 0; d < reach; d++) {
    store<f32>(padded - ((d + 1) << 2), mirror ? load<f32>(cells + (mirrored(-1 - d, width) << 2)) : 0);
    store<f32>(
      padded + ((width + d) << 2),
      mirror ? load<f32>(cells + (mirrored(width + d, width) << 2)) : 0,
    );
  }
  startSums(out, padded);
  for (let d = 1; d <= reach; d++) addPair(out, padded - (d << 2), padded + (d << 2), d);
}

/** Starts the sums of a row with what it weighs itself. */
function startSums(sums: usize, row: usize): void {
  const tap = v128.load32_splat(grazerTaps);
  const end = (<usize>groups) << 4;
  for (let at: usize = 0; at < end; at += 16) v128.store(sums + at, f32x4.mul(tap, v128.load(row + at)));
}

/**
 * Adds what the two rows at distance d weigh. A distance at a time, not a cell: sums of many cells do not wait for one
 * another, and the rows lie in the nearest cache.
 */
function addPair(sums: usize, one: usize, other: usize, d: i32): void {
  const tap = v128.load32_splat(grazerTaps + (d << 2));
  const end = (<usize>groups) << 4;
  for (let at: usize = 0; at < end; at += 16) {
    const both = f32x4.add(v128.load(one + at), v128.load(other + at));
    v128.store(sums + at, f32x4.add(v128.load(sums + at), f32x4.mul(tap, both)));
  }
}

/** The spread row that stands for row y, which may lie beyond the edge. */
function rowAt(y: i32): usize {
  if (y >= 0 && y < height) return ring + <usize>(y % slots) * rowBytes;
  return ring + <usize>(mirror ? mirrored(y, height) % slots : slots) * rowBytes;
}
