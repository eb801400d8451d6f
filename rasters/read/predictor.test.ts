import { expect, it } from 'vitest';
import { differenceFloats } from '#rasters/write/difference-floats.ts';
import { toHostOrder, undoDifferences, undoFloatDifferences } from './predictor.ts';

const shape = { width: 3, samples: 1, rows: 2, littleEndian: true };

it('undoes differences row by row, in arithmetic of the cell’s width', () => {
  const bytes = Uint8Array.of(250, 10, 1, 5, 255, 1);
  undoDifferences(bytes, { ...shape, bytesPerCell: 1 });
  expect([...bytes]).toEqual([250, 4, 5, 5, 4, 5]);
  const words = Uint16Array.of(65_000, 1000, 1, 1, 1, 1);
  undoDifferences(new Uint8Array(words.buffer), { ...shape, bytesPerCell: 2 });
  expect([...words]).toEqual([65_000, 464, 465, 1, 2, 3]);
  const longs = BigUint64Array.of(2n ** 63n, 2n ** 63n, 1n, 7n, 0n, 1n);
  undoDifferences(new Uint8Array(longs.buffer), { ...shape, bytesPerCell: 8 });
  expect([...longs]).toEqual([2n ** 63n, 0n, 1n, 7n, 7n, 8n]);
});

it('undoes differences between cells of two samples, each of its own', () => {
  const two = { ...shape, rows: 1, samples: 2 };
  const bytes = Uint8Array.of(10, 200, 1, 100, 2, 3);
  undoDifferences(bytes, { ...two, bytesPerCell: 1 });
  expect([...bytes]).toEqual([10, 200, 11, 44, 13, 47]);
  const longs = BigUint64Array.of(1n, 2n ** 63n, 1n, 2n ** 63n, 1n, 5n);
  undoDifferences(new Uint8Array(longs.buffer), { ...two, bytesPerCell: 8 });
  expect([...longs]).toEqual([1n, 2n ** 63n, 2n, 0n, 3n, 5n]);
});

it('undoes floating-point differences: planes of bytes, most significant first', () => {
  // 1.0 = 3f 80 00 00 and 2.0 = 40 00 00 00: planes 3f 40 | 80 00 | 00 00 | 00 00, then byte differences.
  const bytes = Uint8Array.of(0x3f, 0x01, 0x40, 0x80, 0, 0, 0, 0);
  undoFloatDifferences(bytes, { width: 2, samples: 1, rows: 1, bytesPerCell: 4, littleEndian: true });
  expect([...new Float32Array(bytes.buffer)]).toEqual([1, 2]);
  expect([...differenceFloats(new Uint8Array(Float32Array.of(1, 2).buffer), 2)]).toEqual([
    0x3f, 0x01, 0x40, 0x80, 0, 0, 0, 0,
  ]);
});

it('puts big-endian cells into host order and leaves others alone', () => {
  const bytes = Uint8Array.of(1, 2, 3, 4);
  toHostOrder(bytes, 4, true);
  expect([...bytes]).toEqual([1, 2, 3, 4]);
  toHostOrder(bytes, 2, false);
  expect([...bytes]).toEqual([2, 1, 4, 3]);
});
