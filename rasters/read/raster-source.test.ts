import { expect, it } from 'vitest';
import { readAhead } from './raster-source.ts';

/** A source of numbered bytes that remembers what it was asked for. */
function numbered(size: number) {
  const asked: [offset: number, length: number][] = [];
  const read = (offset: number, length: number) => {
    asked.push([offset, length]);
    return Promise.resolve(Uint8Array.from({ length }, (_, i) => (offset + i) % 251));
  };
  return { asked, source: { size, read } };
}

it('reads ahead through blocks that stand one after another, and gives the same bytes', async () => {
  const { asked, source } = numbered(40_000);
  const ahead = readAhead(source);
  for (let at = 100; at + 104 <= 40_000; at += 104)
    expect(await ahead.read(at, 100)).toEqual(Uint8Array.from({ length: 100 }, (_, i) => (at + i) % 251));
  expect(asked).toEqual([
    [100, 100],
    [204, 39_796],
  ]);
});

it('reads no more than it is asked for where they are scattered, or large', async () => {
  const { asked, source } = numbered(2_000_000);
  const ahead = readAhead(source);
  const calls: [number, number][] = [
    [0, 10],
    [1000, 10],
    [500, 10],
    [100_000, 300_000],
    [400_000, 300_000],
  ];
  for (const [offset, length] of calls) expect(await ahead.read(offset, length)).toHaveLength(length);
  expect(asked).toEqual(calls);
});
