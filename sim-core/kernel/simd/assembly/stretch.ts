/**
 * A row is worked on in stretches of at most `stretch` groups that hear something, so that what one loop leaves for the
 * next stays in the nearest cache. Short runs share a stretch: a loop that is over when it has hardly begun costs more than
 * its work. A record a group, 64 bytes: four floats each of what is heard, K (the bytes of the ground, at first), q and
 * e^((X − X^c)/ω); the last two give way to the chances of standing and of free sites. One record to spare.
 */
export const stretch: i32 = 64;
export const records: usize = memory.data(65 << 6, 64);

export const held: usize = 16;
export const recruitment: usize = 32;
export const wetness: usize = 48;
export const standing: usize = 32;
export const free: usize = 48;

/** Groups of a stretch that follow one another: the first, and the first behind them. */
const pieces: usize = memory.data(64 << 3, 16);
export let pieceCount: i32 = 0;

/** Adds groups `from` up to `to` to a stretch that holds `many`. */
export function addPiece(many: i32, from: i32, to: i32): void {
  if (many == 0) pieceCount = 0;
  const piece = pieces + ((<usize>pieceCount) << 3);
  store<i32>(piece, from);
  store<i32>(piece, to, 4);
  pieceCount++;
}

export function pieceFrom(piece: i32): i32 {
  return load<i32>(pieces + ((<usize>piece) << 3));
}

export function pieceTo(piece: i32): i32 {
  return load<i32>(pieces + ((<usize>piece) << 3), 4);
}
