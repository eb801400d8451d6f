import { clear, copy, mark, nextRun, runEnd } from './runs';
import {
  above,
  alive,
  below,
  bitStride,
  cover,
  groups,
  heardBits,
  height,
  mirror,
  padded,
  lastLanes,
  radius,
  rowBytes,
  skipsBare,
  slots,
  spread,
  spreadBits,
  taps,
  width,
} from './state';
import { pieceCount, pieceFrom, pieceTo, records } from './stretch';

/** Index that a half-sample symmetric boundary puts in the place of i: … 1 0 | 0 1 … n−1 | n−1 n−2 … */
export function mirrored(i: i32, n: i32): i32 {
  // Remainders are slow, and few maps are narrower than their kernel.
  const within = i >= -n && i < 2 * n ? i : ((i % (2 * n)) + 2 * n) % (2 * n);
  return within < 0 ? -1 - within : within < n ? within : 2 * n - 1 - within;
}

/** Weighs one row along itself, groups `from` up to `to`. Weights of equal distance are summed before they are weighed. */
function along(out: usize, from: i32, to: i32): void {
  const row = padded;
  const weights = taps;
  const last = weights + (radius << 2);
  let g = from;
  for (; g + 4 <= to; g += 4) {
    const at = row + (g << 4);
    let left = at;
    let right = at;
    let tap = v128.load32_splat(weights);
    let a = f32x4.mul(tap, v128.load(at));
    let b = f32x4.mul(tap, v128.load(at, 16));
    let c = f32x4.mul(tap, v128.load(at, 32));
    let d = f32x4.mul(tap, v128.load(at, 48));
    for (let weight = weights + 4; weight <= last; weight += 4) {
      left -= 4;
      right += 4;
      tap = v128.load32_splat(weight);
      a = f32x4.add(a, f32x4.mul(tap, f32x4.add(v128.load(left), v128.load(right))));
      b = f32x4.add(b, f32x4.mul(tap, f32x4.add(v128.load(left, 16), v128.load(right, 16))));
      c = f32x4.add(c, f32x4.mul(tap, f32x4.add(v128.load(left, 32), v128.load(right, 32))));
      d = f32x4.add(d, f32x4.mul(tap, f32x4.add(v128.load(left, 48), v128.load(right, 48))));
    }
    const to = out + (g << 4);
    v128.store(to, a);
    v128.store(to, b, 16);
    v128.store(to, c, 32);
    v128.store(to, d, 48);
  }
  for (; g < to; g++) {
    const at = row + (g << 4);
    let left = at;
    let right = at;
    let a = f32x4.mul(v128.load32_splat(weights), v128.load(at));
    for (let weight = weights + 4; weight <= last; weight += 4) {
      left -= 4;
      right += 4;
      a = f32x4.add(a, f32x4.mul(v128.load32_splat(weight), f32x4.add(v128.load(left), v128.load(right))));
    }
    v128.store(out + (g << 4), a);
  }
}

/** Bit i: cell i of a group of a row of cover is not 0. */
function lanesOf(cells: usize, group: i32): i32 {
  const c = v128.load(cells + ((<usize>group) << 4));
  return i32x4.bitmask(i32x4.ne(group + 1 == groups ? v128.and(c, lastLanes) : c, i64x2.splat(0)));
}

/** Marks the groups that hear groups `from` up to `to` of a row of cover, both ends of which hold something. */
function markReach(bits: usize, cells: usize, from: i32, to: i32): void {
  const first = (from << 2) + ctz(lanesOf(cells, from)) - radius;
  const last = (to << 2) - 4 + (31 - clz(lanesOf(cells, to - 1))) + radius;
  mark(bits, max(0, first >> 2), min(groups, (last >> 2) + 1));
}

/** Spreads row y along itself into its slot of the ring, and marks how far. */
export function spreadRow(y: i32): void {
  const slot = y % slots;
  const out = spread + <usize>slot * rowBytes;
  const bits = spreadBits + <usize>slot * bitStride;
  for (let g = nextRun(bits, 0, groups); g >= 0; g = nextRun(bits, runEnd, groups))
    clear(out + (g << 4), (runEnd - g) << 4);
  clear(bits, bitStride);

  const source = alive + <usize>y * bitStride;
  const cells = cover + ((<usize>y * <usize>width) << 2);
  let any = false;
  for (let g = nextRun(source, 0, groups); g >= 0; g = nextRun(source, runEnd, groups)) {
    any = true;
    copy(padded + (g << 4), cells + (g << 4), (runEnd - g) << 4);
    if (skipsBare) markReach(bits, cells, g, runEnd);
    else mark(bits, 0, groups);
  }
  if (!any) return;
  for (let d = 0; d < radius; d++) {
    store<f32>(padded - ((d + 1) << 2), mirror ? load<f32>(cells + (mirrored(-1 - d, width) << 2)) : 0);
    store<f32>(
      padded + ((width + d) << 2),
      mirror ? load<f32>(cells + (mirrored(width + d, width) << 2)) : 0,
    );
  }
  for (let g = nextRun(bits, 0, groups); g >= 0; g = nextRun(bits, runEnd, groups)) along(out, g, runEnd);
  for (let g = nextRun(source, 0, groups); g >= 0; g = nextRun(source, runEnd, groups))
    clear(padded + (g << 4), (runEnd - g) << 4);
}

/** Slot of a row that may lie beyond the edge; `within` is that of a row of the map, but for one turn of the ring. */
function slotOf(row: i32, within: i32): i32 {
  if (row < 0 || row >= height) return mirror ? mirrored(row, height) % slots : slots;
  return within < 0 ? within + slots : within < slots ? within : within - slots;
}

function hearFrom(slot: i32): usize {
  const bits = spreadBits + <usize>slot * bitStride;
  for (let at: usize = 0; at < <usize>bitStride; at += 16)
    v128.store(heardBits + at, v128.or(v128.load(heardBits + at), v128.load(bits + at)));
  return spread + <usize>slot * rowBytes;
}

/** Finds the spread rows around row y, and marks in `heardBits` the groups of the row that hear something of them. */
export function lookAround(y: i32): void {
  const slot = y % slots;
  clear(heardBits, bitStride);
  for (let d = 0; d <= radius; d++) {
    store<usize>(above + (d << 2), hearFrom(slotOf(y - d, slot - d)));
    store<usize>(below + (d << 2), hearFrom(slotOf(y + d, slot + d)));
  }
}

/** Weighs the spread rows around the present one, at the groups of the stretch. */
export function hear(): void {
  let record = records;
  for (let piece = 0; piece < pieceCount; piece++) {
    const from = pieceFrom(piece);
    const to = pieceTo(piece);
    hearPiece(from, to, record);
    record += (<usize>(to - from)) << 6;
  }
}

/** The same for groups `from` up to `to`, into records from `out` on. */
function hearPiece(from: i32, to: i32, out: usize): void {
  const weights = taps;
  const up0 = load<usize>(above);
  const aboves = above;
  const belows = below;
  const last = radius << 2;
  let g = from;
  for (; g + 4 <= to; g += 4) {
    const shift = g << 4;
    let up = up0 + shift;
    let tap = v128.load32_splat(weights);
    let a = f32x4.mul(tap, v128.load(up));
    let b = f32x4.mul(tap, v128.load(up, 16));
    let c = f32x4.mul(tap, v128.load(up, 32));
    let d = f32x4.mul(tap, v128.load(up, 48));
    for (let i = 4; i <= last; i += 4) {
      tap = v128.load32_splat(weights + i);
      up = load<usize>(aboves + i) + shift;
      const down = load<usize>(belows + i) + shift;
      a = f32x4.add(a, f32x4.mul(tap, f32x4.add(v128.load(up), v128.load(down))));
      b = f32x4.add(b, f32x4.mul(tap, f32x4.add(v128.load(up, 16), v128.load(down, 16))));
      c = f32x4.add(c, f32x4.mul(tap, f32x4.add(v128.load(up, 32), v128.load(down, 32))));
      d = f32x4.add(d, f32x4.mul(tap, f32x4.add(v128.load(up, 48), v128.load(down, 48))));
    }
    v128.store(out, a);
    v128.store(out, b, 64);
    v128.store(out, c, 128);
    v128.store(out, d, 192);
    out += 256;
  }
  for (; g < to; g++) {
    const shift = g << 4;
    let a = f32x4.mul(v128.load32_splat(weights), v128.load(up0 + shift));
    for (let i = 4; i <= last; i += 4)
      a = f32x4.add(
        a,
        f32x4.mul(
          v128.load32_splat(weights + i),
          f32x4.add(v128.load(load<usize>(aboves + i) + shift), v128.load(load<usize>(belows + i) + shift)),
        ),
      );
    v128.store(out, a);
    out += 64;
  }
}
