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
export let capacity: usize = 0;
export let vigour: usize = 0;
export let exposure: usize = 0;
export let refuge: usize = 0;

/** a byte a group: may it hold cover; rows are `flagStride` apart, with zeros behind the last group */
export let alive: usize = 0;
export let flagStride: i32 = 0;
/** rows that the ring of spread rows holds; one more behind them is never written and stays 0 */
export let slots: i32 = 0;
/** bytes of a row of floats */
export let rowBytes: i32 = 0;
export let spread: usize = 0;
export let spreadFlags: usize = 0;
/** groups of the present row that hear something, and what they hear */
export let heardFlags: usize = 0;
export let heard: usize = 0;
/** cell 0 of one row of cover with room for its boundary on both sides; 0 between uses, but for the boundary */
export let padded: usize = 0;
/** f32 weight of each distance, and the spread rows above and below at each distance */
export let taps: usize = 0;
export let above: usize = 0;
export let below: usize = 0;
/** losses of one row, four lanes each: all, and those by drought */
export let lostRow: usize = 0;

/** counts: chance of a standing and of a free site, random words of a span, sites by capacity byte, K by capacity byte */
export let standing: usize = 0;
export let free: usize = 0;
export let words: usize = 0;
export let sites: usize = 0;
export let shares: usize = 0;
/** counts: (n − k)/(k + 1) for n and k below 32 */
export let ratios: usize = 0;

export let carryOver: f32 = 0;
export let recruits: f32 = 0;
export let seedlings: f32 = 0;
export let years: f32 = 0;
export let backgroundLoss: f32 = 0;
export let droughtLoss: f32 = 0;
export let refugeGrowth: f32 = 0;
export let crowding: f32 = 0;
/** shifts of the drought index, in widths of the loss curve */
export let tolerance: f64 = 0;
export let lossWidth: f64 = 0;
export let exposureShift: f32 = 0;
export let refugeShift: f32 = 0;
export let neighbourShift: f32 = 0;

export let key0: u32 = 0;
export let key1: u32 = 0;
export let replicate: u32 = 0;

let top: usize = 0;

/** A stretch of memory that starts on 16 bytes and may be read 16 bytes past its end. */
function room(bytes: usize): usize {
  const start = top;
  top = (top + bytes + 31) & ~15;
  return start;
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
  flagStride = (groups + 31) & ~15;
  rowBytes = groups << 4;
  slots = <i32>Math.min(height, 2 * radius + 1);
  const cells = <usize>width * <usize>height;
  // Addresses have 32 bits.
  if (<u64>width * <u64>height > 256 << 20) return false;

  top = (__heap_base + 15) & ~15;
  cover = room(cells << 2);
  capacity = room(cells);
  vigour = room(cells);
  exposure = room(cells);
  refuge = room(cells);
  if (counts) clumps = room(wide ? cells << 2 : cells << 1);
  alive = room(<usize>height * flagStride);
  spread = room(<usize>(slots + 1) * rowBytes);
  spreadFlags = room(<usize>(slots + 1) * flagStride);
  heardFlags = room(flagStride);
  heard = room(rowBytes);
  const side = (radius + 3) & ~3;
  padded = room(<usize>((side << 1) << 2) + rowBytes) + (side << 2);
  taps = room((radius + 1) << 2);
  above = room((radius + 1) << 2);
  below = room((radius + 1) << 2);
  lostRow = room(32);
  if (counts) {
    standing = room(rowBytes);
    free = room(rowBytes);
    words = room((rowBytes << 1) + 128);
    sites = room(256 << 2);
    shares = room(256 << 3);
    ratios = room((32 * 32) << 3);
  }
  const missing = <i32>((top + 65535) >> 16) - memory.size();
  if (missing > 0 && memory.grow(missing) < 0) return false;
  if (counts) {
    for (let k = 0; k < 256; k++) store<f64>(shares + (k << 3), <f64>k / 255);
    for (let n = 0; n < 32; n++)
      for (let k = 0; k < 32; k++) store<f64>(ratios + (((n << 5) + k) << 3), <f64>(n - k) / <f64>(k + 1));
  }
  return true;
}

export function setSpread(
  carry: f64,
  recruitsPerStep: f64,
  seedlingsPerStep: f64,
  growth: f64,
  crowd: f64,
): void {
  carryOver = <f32>carry;
  recruits = <f32>recruitsPerStep;
  seedlings = <f32>seedlingsPerStep;
  refugeGrowth = <f32>growth;
  crowding = <f32>crowd;
}

export function setLoss(
  stepYears: f64,
  background: f64,
  drought: f64,
  indexWidth: f64,
  indexTolerance: f64,
  byExposure: f64,
  byRefuge: f64,
  byNeighbours: f64,
): void {
  years = <f32>stepYears;
  backgroundLoss = <f32>background;
  droughtLoss = <f32>drought;
  lossWidth = indexWidth;
  tolerance = indexTolerance;
  exposureShift = <f32>(byExposure / indexWidth);
  refugeShift = <f32>(byRefuge / indexWidth);
  neighbourShift = <f32>(byNeighbours / indexWidth);
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
