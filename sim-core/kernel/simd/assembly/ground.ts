import { ground, groundRow, groups, width } from './state';

/** Parts of the ground, in the order in which a group holds them: K, g, E, M. */
const refuge: i32 = 3;

/** Where the bytes of the first group of row y lie; those of the next group lie 64 bytes on. */
export function groundOf(y: i32): usize {
  return ground + (((<usize>(y >> 2) * <usize>groups) << 6) | (((<usize>y) & 3) << 4));
}

/** Takes one part of row y from `groundRow`. */
export function layGround(part: i32, y: i32): void {
  const row = groundOf(y) + (part << 2);
  for (let g: usize = 0; g < <usize>groups; g++) store<u32>(row + (g << 6), load<u32>(groundRow + (g << 2)));
}

function refugeByte(cell: i32): usize {
  const y = cell / width;
  const x = cell - y * width;
  return groundOf(y) + ((<usize>(x >> 2)) << 6) + (refuge << 2) + (x & 3);
}

export function refugeAt(cell: i32): i32 {
  return load<u8>(refugeByte(cell));
}

export function setRefuge(cell: i32, value: i32): void {
  store<u8>(refugeByte(cell), <u8>value);
}
