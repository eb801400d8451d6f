// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { copyTile, splitTiles } from './split-tiles.ts';

describe('splitTiles', () => {
  it('needs one tile up to the limit of the card', () => {
    expect(splitTiles(4000, 4000, 8192)).toEqual([{ column: 0, row: 0, width: 4000, height: 4000 }]);
    expect(splitTiles(8192, 1, 8192)).toHaveLength(1);
  });
  it.each([
    [8193, 4000, 8192, 2],
    [20_000, 9000, 8192, 6],
    [7, 5, 3, 6],
  ])('covers %i × %i cells under a limit of %i once, by %i tiles', (width, height, limit, count) => {
    const tiles = splitTiles(width, height, limit);
    expect(tiles).toHaveLength(count);
    expect(tiles.every((t) => t.width > 0 && t.width <= limit && t.height > 0 && t.height <= limit)).toBe(
      true,
    );
    expect(tiles.reduce((n, t) => n + t.width * t.height, 0)).toBe(width * height);
    const owner = (column: number, row: number) =>
      tiles.filter(
        (t) => column >= t.column && column < t.column + t.width && row >= t.row && row < t.row + t.height,
      ).length;
    for (let i = 0; i < 200; i++) expect(owner((i * 7919) % width, (i * 104_729) % height)).toBe(1);
  });
});

it('copyTile takes the cells of its tile, and all tiles together give the raster back', () => {
  const [width, height] = [7, 5];
  const values = Uint8Array.from({ length: width * height }, (_, i) => i + 1);
  const back = new Uint8Array(width * height);
  for (const tile of splitTiles(width, height, 3)) {
    const cells = new Uint8Array(tile.width * tile.height);
    copyTile(values, width, tile, cells);
    cells.forEach((v, i) => {
      back[(tile.row + Math.floor(i / tile.width)) * width + tile.column + (i % tile.width)] = v;
    });
  }
  expect(back).toEqual(values);
});
