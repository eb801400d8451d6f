/** End of the run that `nextRun` found: the first group behind it. */
export let runEnd: i32 = 0;

/** First group, from `from` on, of the next run of flags that are set; −1 where there is none. `flags` may be read 16 on. */
export function nextRun(flags: usize, from: i32, groups: i32): i32 {
  let g = from;
  while (g < groups) {
    if (!v128.any_true(v128.load(flags + g))) g += 16;
    else {
      while (!load<u8>(flags + g)) g++;
      break;
    }
  }
  if (g >= groups) return -1;
  const start = g;
  while (g + 16 <= groups && i8x16.all_true(v128.load(flags + g))) g += 16;
  while (g < groups && load<u8>(flags + g)) g++;
  runEnd = g;
  return start;
}
