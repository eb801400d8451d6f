import { groundOf } from './ground';
import { nextRun, runEnd } from './runs';
import { cover, groups, heardBits, width } from './state';
import { addPiece, held, records, stretch } from './stretch';

/** Group that the next stretch of the row begins with; −1 where none is left. */
export let ahead: i32 = 0;

/** Begins a row at the first group that hears something. */
export function startRow(): void {
  ahead = nextRun(heardBits, 0, groups);
}

/**
 * Fills a stretch with the next groups of row y that hear something, and takes their ground.
 *
 * Short runs lie far apart in memory. What they will need of it is read here at one go, the cover to no other end than
 * that the memory answers for all of them at once: in the loops that follow each run would wait for its own.
 *
 * @returns how many they are; `ahead` says where to go on
 */
export function gather(y: i32): i32 {
  const cells = cover + ((<usize>y * <usize>width) << 2);
  const ground = groundOf(y);
  let many = 0;
  let g = ahead;
  let record = records;
  while (g >= 0 && many < stretch) {
    const to = min(g + stretch - many, runEnd);
    addPiece(many, g, to);
    many += to - g;
    for (; g < to; g++, record += 64) {
      load<u32>(cells + ((<usize>g) << 4));
      v128.store(record, v128.load(ground + ((<usize>g) << 6)), held);
    }
    if (g == runEnd) g = nextRun(heardBits, g, groups);
  }
  ahead = g;
  return many;
}
