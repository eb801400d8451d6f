/**
 * Philox4x32-10 (Salmon, Moraes, Dror & Shaw 2011, SC'11, doi:10.1145/2063384.2063405) of four neighbouring counters at
 * once: (counter, step, replicate, process 0) … (counter + 3, …).
 *
 * @param out 16 words: the four of the first counter, then those of the next
 */
export function philox(out: usize, counter: u32, step: u32, replicate: u32, key0: u32, key1: u32): void {
  const multiplier0 = i32x4.splat(0xd2511f53);
  const multiplier1 = i32x4.splat(0xcd9e8d57);
  let c0 = i32x4.add(i32x4.splat(counter), i32x4(0, 1, 2, 3));
  let c1 = i32x4.splat(step);
  let c2 = i32x4.splat(replicate);
  let c3 = i32x4.splat(0);
  let k0 = key0;
  let k1 = key1;
  for (let round = 0; round < 10; round++) {
    const a = i64x2.extmul_low_i32x4_u(c0, multiplier0);
    const b = i64x2.extmul_high_i32x4_u(c0, multiplier0);
    const c = i64x2.extmul_low_i32x4_u(c2, multiplier1);
    const d = i64x2.extmul_high_i32x4_u(c2, multiplier1);
    c0 = v128.xor(v128.xor(v128.shuffle<u32>(c, d, 1, 3, 5, 7), c1), i32x4.splat(k0));
    c1 = v128.shuffle<u32>(c, d, 0, 2, 4, 6);
    c2 = v128.xor(v128.xor(v128.shuffle<u32>(a, b, 1, 3, 5, 7), c3), i32x4.splat(k1));
    c3 = v128.shuffle<u32>(a, b, 0, 2, 4, 6);
    k0 += 0x9e3779b9;
    k1 += 0xbb67ae85;
  }
  const low01 = v128.shuffle<u32>(c0, c1, 0, 4, 1, 5);
  const high01 = v128.shuffle<u32>(c0, c1, 2, 6, 3, 7);
  const low23 = v128.shuffle<u32>(c2, c3, 0, 4, 1, 5);
  const high23 = v128.shuffle<u32>(c2, c3, 2, 6, 3, 7);
  v128.store(out, v128.shuffle<u64>(low01, low23, 0, 2));
  v128.store(out, v128.shuffle<u64>(low01, low23, 1, 3), 16);
  v128.store(out, v128.shuffle<u64>(high01, high23, 0, 2), 32);
  v128.store(out, v128.shuffle<u64>(high01, high23, 1, 3), 48);
}
