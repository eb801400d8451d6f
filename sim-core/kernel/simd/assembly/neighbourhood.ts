import { clear, copy, mark, nextRun, runEnd } from './runs';
import {
  above,
  alive,
  below,
  cover,
  flagStride,
  groups,
  heardFlags,
  height,
  mirror,
  padded,
  radius,
  rowBytes,
  slots,
  spread,
  spreadFlags,
  taps,
  width,
} from './state';
import { records } from './stretch';

/** Index that a half-sample symmetric boundary puts in the place of i: … 1 0 | 0 1 … n−1 | n−1 n−2 … */
export function mirrored(i: i32, n: i32): i32 {
  const within = ((i % (2 * n)) + 2 * n) % (2 * n);
  return within < n ? within : 2 * n - 1 - within;
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

/** Flags of the groups of row y that hear something. */
export function heardBy(y: i32): usize {
  return heardFlags + <usize>(y % slots) * flagStride;
}

/** Spreads row y along itself into its slot of the ring, and marks who hears it. */
export function spreadRow(y: i32): void {
  const slot = y % slots;
  const out = spread + <usize>slot * rowBytes;
  const flags = spreadFlags + <usize>slot * flagStride;
  for (let g = nextRun(flags, 0, groups); g >= 0; g = nextRun(flags, runEnd, groups))
    clear(out + (g << 4), (runEnd - g) << 4);
  clear(flags, flagStride);

  const source = alive + <usize>y * flagStride;
  const cells = cover + ((<usize>y * <usize>width) << 2);
  const reach = (radius + 3) >> 2;
  let any = false;
  for (let g = nextRun(source, 0, groups); g >= 0; g = nextRun(source, runEnd, groups)) {
    any = true;
    copy(padded + (g << 4), cells + (g << 4), (runEnd - g) << 4);
    mark(flags, max(0, g - reach), min(groups, runEnd + reach));
  }
  if (!any) return;
  for (let d = 0; d < radius; d++) {
    store<f32>(padded - ((d + 1) << 2), mirror ? load<f32>(cells + (mirrored(-1 - d, width) << 2)) : 0);
    store<f32>(
      padded + ((width + d) << 2),
      mirror ? load<f32>(cells + (mirrored(width + d, width) << 2)) : 0,
    );
  }
  const first = max(0, y - radius);
  const last = min(height - 1, y + radius);
  for (let g = nextRun(flags, 0, groups); g >= 0; g = nextRun(flags, runEnd, groups)) {
    along(out, g, runEnd);
    // A row that is heard by way of the mirror is heard from no farther than this.
    for (let at = first; at <= last; at++) mark(heardBy(at), g, runEnd);
  }
  for (let g = nextRun(source, 0, groups); g >= 0; g = nextRun(source, runEnd, groups))
    clear(padded + (g << 4), (runEnd - g) << 4);
}

function slotOf(y: i32): i32 {
  if (y >= 0 && y < height) return y % slots;
  return mirror ? mirrored(y, height) % slots : slots;
}

/** Finds the spread rows around row y. */
export function lookAround(y: i32): void {
  for (let d = 0; d <= radius; d++) {
    store<usize>(above + (d << 2), spread + <usize>slotOf(y - d) * rowBytes);
    store<usize>(below + (d << 2), spread + <usize>slotOf(y + d) * rowBytes);
  }
}

/** Weighs the spread rows around the present one, groups `from` up to `to`: one stretch. */
export function hear(from: i32, to: i32): void {
  const weights = taps;
  const up0 = load<usize>(above);
  const aboves = above;
  const belows = below;
  let out = records;
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
