import { describe, expect, test } from 'vitest';
import { describeBinomialQuantile } from '#sim-core/testing/binomial-quantile.ts';
import { binomialQuantile } from '#sim-core/random/binomial.ts';
import { philox4x32 } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { instantiateKernel } from './kernel-module.ts';

const kernel = instantiateKernel();
kernel.layOut(8, 1, 1, true, true, true);

describeBinomialQuantile('of the shipping kernel', (u, n, p) => kernel.binomialQuantile(u, n, p));

describe('the draws of the shipping kernel', () => {
  test('are those of Philox one by one, four counters at once', () => {
    const words = new Uint32Array(kernel.memory.buffer, kernel.words.value, 16);
    const one = new Uint32Array(4);
    for (const [counter, step, replicate, k0, k1] of [
      [0, 0, 0, 0, 0],
      [7, 3, 2, 0xdeadbeef, 1],
      [0xfffffffc, 0xffffffff, 0x80000000, 0x12345678, 0xffffffff],
    ]) {
      kernel.philox(kernel.words.value, counter, step, replicate, k0, k1);
      for (let c = 0; c < 4; c++) {
        philox4x32(one, counter + c, step, replicate, 0, k0, k1);
        expect([...words.subarray(4 * c, 4 * c + 4)]).toEqual([...one]);
      }
    }
  });

  test('two at once are the quantiles one by one, to the last', () => {
    const random = stream('pairs', 'parameters');
    const view = new DataView(kernel.memory.buffer);
    const word = kernel.words.value;
    const chance = word + 64;
    for (let i = 0; i < 200_000; i++) {
      const N = 1 + Math.floor(random.quick() * 31);
      const n = Math.floor(random.quick() * (N + 1));
      const words = [random.int32() >>> 0, i % 50 ? random.int32() >>> 0 : 0xffffffff];
      const chances = [random.quick() ** 4, i % 3 ? random.quick() : 1 - random.quick() ** 6].map((p, k) =>
        i % 97 ? Math.fround(p) : k,
      );
      words.forEach((w, k) => view.setUint32(word + 4 * k, w, true));
      chances.forEach((p, k) => view.setFloat32(chance + 16 * k, p, true));
      const [u1, u2] = words.map((w) => (w + 0.5) / 2 ** 32);
      expect(kernel.drawPair(word, n, N, chance)).toBe(
        binomialQuantile(u1, n, chances[0]) + binomialQuantile(u2, N - n, chances[1]),
      );
    }
  });
});
