/**
 * A row is worked on in stretches of at most `stretch` groups, so that what one loop leaves for the next stays in the
 * nearest cache. A record a group, 64 bytes: four floats each of what is heard, K, q and e^((X − X^c)/ω); the last two
 * give way to the chances of standing and of free sites. One record to spare.
 */
export const stretch: i32 = 64;
export const records: usize = memory.data(65 << 6, 64);

export const held: usize = 16;
export const recruitment: usize = 32;
export const wetness: usize = 48;
export const standing: usize = 32;
export const free: usize = 48;
