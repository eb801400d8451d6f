import { expect, it } from 'vitest';
import { openRaster } from '#rasters/describe/inspect-raster.ts';
import { openBand, type BandBlocks } from '#rasters/read/band-blocks.ts';
import { toSource } from '#rasters/read/raster-source.ts';
import { fileOf, gridOf } from '#rasters/testing/rasters.ts';
import { sourceWindow } from './source-window.ts';

/** 500 × 400 cells of 16 bits in tiles of 256 × 256, four of 131,072 bytes, with a count of how often each is decoded. */
async function counted(most: number) {
  const values = Uint16Array.from({ length: 200_000 }, (_, i) => i % 65_521);
  const source = toSource(fileOf(gridOf(500, 400), values));
  const { layout } = await openRaster(source);
  const blocks = openBand(source, layout, { index: 1, noData: null });
  const reads = [0, 0, 0, 0];
  const counting: BandBlocks = {
    layout,
    read: (index) => {
      reads[index]++;
      return blocks.read(index);
    },
  };
  return { window: sourceWindow(counting, { noData: null, southUp: false, most }), reads, values };
}
const across = { left: 250, top: 10, width: 20, height: 5 };

it('gives the same cells wherever the tiles end', async () => {
  const { window, values } = await counted(1e6);
  const got = await window.load({ left: 250, top: 250, width: 20, height: 12 });
  const wanted = Array.from(
    { length: 240 },
    (_, i) => values[(250 + Math.floor(i / 20)) * 500 + 250 + (i % 20)],
  );
  expect([...got]).toEqual(wanted);
});

it('decodes each tile once while its memory holds them', async () => {
  const { window, reads } = await counted(4 * 131_072);
  for (let i = 0; i < 3; i++) {
    await window.load(across);
    await window.load({ ...across, top: 300 });
  }
  expect(reads).toEqual([1, 1, 1, 1]);
});

it('lets go of the tile that was used longest ago, and keeps no more than it may', async () => {
  const { window, reads } = await counted(2 * 131_072);
  await window.load(across);
  await window.load(across);
  expect(reads).toEqual([1, 1, 0, 0]);
  // Tile 0 is used again, so tile 1 goes when tile 2 comes.
  await window.load({ ...across, left: 0 });
  await window.load({ ...across, left: 0, top: 300 });
  await window.load({ ...across, left: 0 });
  expect(reads).toEqual([1, 1, 1, 0]);
  await window.load(across);
  expect(reads).toEqual([1, 2, 1, 0]);
});
