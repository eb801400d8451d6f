import { expect, test } from 'vitest';
import { cellLuck } from './cell-luck.ts';
import { philox4x32, uniform } from './philox.ts';

/** Known answers: DEShawResearch/random123, commit 9545ff64, tests/kat_vectors lines 24 to 29. */
const knownAnswers: [rounds: number, counter: string, key: string, output: string][] = [
  [7, '00000000 00000000 00000000 00000000', '00000000 00000000', '5f6fb709 0d893f64 4f121f81 4f730a48'],
  [7, 'ffffffff ffffffff ffffffff ffffffff', 'ffffffff ffffffff', '5207ddc2 45165e59 4d8ee751 8c52f662'],
  [7, '243f6a88 85a308d3 13198a2e 03707344', 'a4093822 299f31d0', '4dfccaba 190a87f0 c47362ba b6b5242a'],
  [10, '00000000 00000000 00000000 00000000', '00000000 00000000', '6627e8d5 e169c58d bc57ac4c 9b00dbd8'],
  [10, 'ffffffff ffffffff ffffffff ffffffff', 'ffffffff ffffffff', '408f276d 41c83b0e a20bc7c6 6d5451fd'],
  [10, '243f6a88 85a308d3 13198a2e 03707344', 'a4093822 299f31d0', 'd16cfe09 94fdcceb 5001e420 24126ea1'],
  // Computed by an independent implementation from the paper.
  [10, '00000001 00000000 00000000 00000000', '0000002a 00000000', 'fcdb2127 53ba6cfd 838f5a6e 744e06fb'],
];
const words = (text: string) => text.split(' ').map((word) => Number.parseInt(word, 16));

test.each(knownAnswers)('philox4x32-%i of %s, key %s', (rounds, counter, key, output) => {
  const out = new Uint32Array(4);
  const [c0, c1, c2, c3] = words(counter);
  const [k0, k1] = words(key);
  philox4x32(out, c0, c1, c2, c3, k0, k1, rounds);
  expect([...out]).toEqual(words(output));
});

test('a word becomes (word + ½) / 2³², never 0 nor 1', () => {
  expect(uniform(0x6627e8d5)).toBeCloseTo(0.3990464706439525, 9);
  expect(uniform(0)).toBe(2 ** -33);
  expect(uniform(0xffffffff)).toBe(1 - 2 ** -33);
});

test('neighbouring cells share a block: words 0, 1 for the even one, 2, 3 for the odd one', () => {
  const luck = cellLuck({ k0: 0, k1: 0 }, 0, 0, 0);
  expect(luck(0)).toEqual({ standing: uniform(0x6627e8d5), free: uniform(0xe169c58d) });
  expect(luck(1)).toEqual({ standing: uniform(0xbc57ac4c), free: uniform(0x9b00dbd8) });
  const out = new Uint32Array(4);
  philox4x32(out, 21, 5, 3, 1, 7, 8);
  expect(cellLuck({ k0: 7, k1: 8 }, 5, 3, 1)(43)).toEqual({
    standing: uniform(out[2]),
    free: uniform(out[3]),
  });
});
