/**
 * Rows of bits, one a group, in words of 64: runs of them are found and marked many at a time. Behind the last group of a
 * row stands at least one bit that is 0.
 */

/** End of the run that `nextRun` found: the first group behind it. */
export let runEnd: i32 = 0;

/** Address of the word that holds the bit of a group. */
function wordOf(bits: usize, group: i32): usize {
  return bits + ((<usize>(group >> 6)) << 3);
}

/** First group, from `from` on, of the next run of bits that are set; −1 where there is none. */
export function nextRun(bits: usize, from: i32, groups: i32): i32 {
  let word = wordOf(bits, from);
  const last = wordOf(bits, groups);
  let set = load<u64>(word) & ((<u64>-1) << (from & 63));
  while (set == 0) {
    word += 8;
    if (word > last) return -1;
    set = load<u64>(word);
  }
  const first = <i32>ctz(set);
  const start = ((<i32>(word - bits)) << 3) + first;
  let unset = ~load<u64>(word) & ((<u64>-1) << first);
  while (unset == 0) {
    word += 8;
    unset = ~load<u64>(word);
  }
  runEnd = ((<i32>(word - bits)) << 3) + <i32>ctz(unset);
  return start;
}

/** Sets the bits of groups `from` up to `to`. */
export function mark(bits: usize, from: i32, to: i32): void {
  for (let g = from; g < to;) {
    const word = wordOf(bits, g);
    const end = min(to, (g | 63) + 1);
    store<u64>(word, load<u64>(word) | (((<u64>-1) >> (64 - (end - g))) << (g & 63)));
    g = end;
  }
}

/** Sets the bits of groups `from` up to `from` + 63 that are set in `those`, and leaves the others. */
export function markWhere(bits: usize, from: i32, those: u64): void {
  const word = wordOf(bits, from);
  const shift = from & 63;
  store<u64>(word, load<u64>(word) | (those << shift));
  const beyond = (those >> 1) >> (63 - shift);
  if (beyond != 0) store<u64>(word + 8, load<u64>(word + 8) | beyond);
}

/** Below this a loop is faster than a call. */
const few: usize = 512;

/** Clears so many bytes, up to the next 16. */
export function clear(at: usize, bytes: usize): void {
  if (bytes > few) memory.fill(at, 0, bytes);
  else for (const end = at + bytes; at < end; at += 16) v128.store(at, i64x2.splat(0));
}

export function copy(to: usize, from: usize, bytes: usize): void {
  if (bytes > few) memory.copy(to, from, bytes);
  else for (const end = from + bytes; from < end; from += 16, to += 16) v128.store(to, v128.load(from));
}
