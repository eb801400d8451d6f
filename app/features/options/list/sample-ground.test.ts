// @vitest-environment node
import { expect, it } from 'vitest';
import { sampleGround } from './sample-ground.ts';

it('takes the cell in the middle of each pixel, when the picture is smaller and when it is larger', () => {
  const cells = Uint8Array.from({ length: 24 }, (_, i) => i);
  const half = sampleGround({ width: 6, height: 4 }, cells, undefined, 3);
  expect([half.height, [...half.cover], half.capacity]).toEqual([2, [7, 9, 11, 19, 21, 23], undefined]);
  const twice = sampleGround({ width: 2, height: 1 }, Uint8Array.of(5, 9), Uint8Array.of(0, 1), 4);
  expect([twice.height, [...twice.cover]]).toEqual([2, [5, 5, 9, 9, 5, 5, 9, 9]]);
  expect([...twice.capacity!]).toEqual([0, 0, 1, 1, 0, 0, 1, 1]);
});
