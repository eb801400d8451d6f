/** End of the run that `nextRun` found: the first group behind it. */
export let runEnd: i32 = 0;

/** Bit i: flag i of the sixteen from `flags` on is set. */
function setBits(flags: usize): i32 {
  return i8x16.bitmask(i8x16.ne(v128.load(flags), i64x2.splat(0)));
}

function noneOf64(flags: usize): bool {
  const first = v128.or(v128.load(flags), v128.load(flags, 16));
  return !v128.any_true(v128.or(first, v128.or(v128.load(flags, 32), v128.load(flags, 48))));
}

/** First group, from `from` on, of the next run of flags that are set; −1 where there is none. Behind the last stand 16 zeros. */
export function nextRun(flags: usize, from: i32, groups: i32): i32 {
  let g = from;
  let bits = 0;
  while (g + 64 <= groups && noneOf64(flags + g)) g += 64;
  while (g < groups) {
    bits = setBits(flags + g);
    if (bits != 0) break;
    g += 16;
  }
  if (g >= groups) return -1;
  g += ctz(bits);
  const start = g;
  bits = setBits(flags + g);
  while (bits == 0xffff) {
    g += 16;
    bits = setBits(flags + g);
  }
  runEnd = g + ctz(~bits);
  return start;
}

/** Below this a loop is faster than a call. */
const few: usize = 512;

export function clear(at: usize, bytes: usize): void {
  if (bytes > few) memory.fill(at, 0, bytes);
  else for (const end = at + bytes; at < end; at += 16) v128.store(at, i64x2.splat(0));
}

/** Sets the flags of groups `from` up to `to`. */
export function mark(flags: usize, from: i32, to: i32): void {
  if (to - from > 64) memory.fill(flags + from, 1, to - from);
  else for (let g = from; g < to; g++) store<u8>(flags + g, 1);
}

export function copy(to: usize, from: usize, bytes: usize): void {
  if (bytes > few) memory.copy(to, from, bytes);
  else for (const end = from + bytes; from < end; from += 16, to += 16) v128.store(to, v128.load(from));
}
