import * as vectors from './vectors';

/** Where one map lies in memory, and the rates of its step. Set once, before the first step. */

export let width: i32 = 0;
export let height: i32 = 0;
export let radius: i32 = 0;
/** columns are worked on four at a time: groups of a row, the last of them perhaps cut short */
export let groups: i32 = 0;
/** lanes of the last group of a row that are cells of it */
export let lastLanes: v128 = i32x4.splat(-1);
export let mirror: bool = false;
export let counts: bool = false;
/** clumps are held in 32 bits, not 16 */
export let wide: bool = false;
/** leave out groups that cannot hold the plant, and those that are bare and hear nothing */
export let skipsBarren: bool = false;
export let skipsBare: bool = false;

export let cover: usize = 0;
export let clumps: usize = 0;
/**
 * K, g, E and M, a byte each, in blocks of four rows by one group: 64 bytes, one line of the cache, so that a small patch
 * of what lives waits for few lines. In a block a row after the other, in a row four bytes each of K, g, E and M.
 */
export let ground: usize = 0;
/** one part of a row, bytes in the order of its cells, on its way to `ground` */
export let groundRow: usize = 0;

/** a bit a group (`runs.ts`): may it hold cover; rows are `bitStride` bytes apart */
export let alive: usize = 0;
export let bitStride: i32 = 0;
/** rows that the ring of spread rows holds; one more behind them is never written and stays 0 */
export let slots: i32 = 0;
/** bytes of a row of floats */
export let rowBytes: i32 = 0;
export let spread: usize = 0;
/** of each row of the ring, the groups that are not 0; and those of the present row that hear something */
export let spreadBits: usize = 0;
export let heardBits: usize = 0;
/** cell 0 of one row of cover with room for its boundary on both sides; 0 between uses, but for the boundary */
export let padded: usize = 0;
/** f32 weight of each distance, and the spread rows above and below at each distance */
export let taps: usize = 0;
export let above: usize = 0;
export let below: usize = 0;
/** losses of one row, four lanes each: all, and those by drought */
export let lostRow: usize = 0;

/** counts: sites by capacity byte, K by capacity byte */
export let sites: usize = 0;
export let shares: usize = 0;
/** counts: (n − k)/(k + 1) for n and k below 32 */
export let ratios: usize = 0;

/** rates that decide what a step must reckon with; all others lie in `vectors.ts` */
export let seedlings: f64 = 0;
export let crowding: f64 = 0;
export let backgroundLoss: f64 = 0;
export let droughtLoss: f64 = 0;
export let tolerance: f64 = 0;
export let lossWidth: f64 = 0;

export let key0: u32 = 0;
export let key1: u32 = 0;
export let replicate: u32 = 0;

let top: usize = 0;

/** A stretch of memory that starts on 16 bytes and may be read 16 bytes past its end. */
export function room(bytes: usize): usize {
  const start = top;
  top = (top + bytes + 31) & ~15;
  return start;
}

/** A stretch of so many lines of the cache, with one more that may be read behind it. */
function blocks(lines: usize): usize {
  top = (top + 63) & ~63;
  return room((lines + 1) << 6);
}

/** Takes the memory that was given room to; false where the machine does not give that much. */
export function claim(): bool {
  const missing = <i32>((top + 65535) >> 16) - memory.size();
  return missing <= 0 || memory.grow(missing) >= 0;
}

/** Lays out the memory of a map; false where the machine does not give that much. */
export function layOut(
  columns: i32,
  rows: i32,
  reach: i32,
  isMirror: bool,
  isCounts: bool,
  isWide: bool,
): bool {
  width = columns;
  height = rows;
  radius = reach;
  mirror = isMirror;
  counts = isCounts;
  wide = isWide;
  groups = (width + 3) >> 2;
  const rest = width & 3;
  lastLanes = rest == 0 ? i32x4.splat(-1) : i32x4.lt_s(i32x4(0, 1, 2, 3), i32x4.splat(rest));
  bitStride = ((groups >> 7) + 1) << 4;
  rowBytes = groups << 4;
  slots = <i32>Math.min(height, 2 * radius + 1);
  const cells = <usize>width * <usize>height;
  // Addresses have 32 bits.
  if (<u64>width * <u64>height > 256 << 20) return false;

  vectors.setConstants();
  top = (__heap_base + 15) & ~15;
  cover = room(cells << 2);
  ground = blocks(<usize>((height + 3) >> 2) * <usize>groups);
  groundRow = room(groups << 2);
  if (counts) clumps = room(wide ? cells << 2 : cells << 1);
  alive = room(<usize>height * bitStride);
  spread = room(<usize>(slots + 1) * rowBytes);
  spreadBits = room(<usize>(slots + 1) * bitStride);
  heardBits = room(bitStride);
  const side = (radius + 3) & ~3;
  padded = room(<usize>((side << 1) << 2) + rowBytes) + (side << 2);
  taps = room((radius + 1) << 2);
  above = room((radius + 1) << 2);
  below = room((radius + 1) << 2);
  lostRow = room(32);
  if (counts) {
    sites = room(256 << 2);
    shares = room(256 << 3);
    ratios = room((32 * 32) << 3);
  }
  if (!claim()) return false;
  if (counts) {
    for (let k = 0; k < 256; k++) store<f64>(shares + (k << 3), <f64>k / 255);
    for (let n = 0; n < 32; n++)
      for (let k = 0; k < 32; k++) store<f64>(ratios + (((n << 5) + k) << 3), <f64>(n - k) / <f64>(k + 1));
  }
  return true;
}

export function setSpread(carryOver: f64, recruits: f64, seeds: f64, growth: f64, crowd: f64): void {
  seedlings = seeds;
  crowding = crowd;
  vectors.set(vectors.carry, carryOver);
  vectors.set(vectors.freed, 1 - carryOver);
  vectors.set(vectors.recruitsPerByte, -recruits / 255);
  vectors.set(vectors.growthPerByte, growth / 255);
  vectors.set(vectors.seeds, seeds);
  vectors.set(vectors.crowd, -crowd);
}

export function setLoss(
  years: f64,
  background: f64,
  drought: f64,
  indexWidth: f64,
  indexTolerance: f64,
  exposureShift: f64,
  refugeShift: f64,
  neighbourShift: f64,
): void {
  backgroundLoss = background;
  droughtLoss = drought;
  lossWidth = indexWidth;
  tolerance = indexTolerance;
  vectors.set(vectors.minusYears, -years);
  vectors.set(vectors.background, background);
  vectors.set(vectors.drought, drought);
  vectors.set(vectors.exposurePerByte, exposureShift / indexWidth / 255);
  vectors.set(vectors.refugePerByte, refugeShift / indexWidth / 255);
  vectors.set(vectors.relief, neighbourShift / indexWidth);
}

export function setLuck(first: u32, second: u32, ofReplicate: u32): void {
  key0 = first;
  key1 = second;
  replicate = ofReplicate;
}

/** Whether to leave out what cannot change. Seedlings need no neighbour: where there are any, bare ground is not left out. */
export function setSkip(skip: bool): void {
  skipsBarren = skip;
  skipsBare = skip && seedlings == 0;
}
