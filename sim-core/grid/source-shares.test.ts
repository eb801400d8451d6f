import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { LayerSource, RasterSource } from '#sim-core/spec/layer-source.ts';
import { sourceBytes, sourceShares } from './build-ground.ts';
import { curveShare } from './curve-share.ts';
import { ShareError } from './ground.ts';
import { shareReader, type RasterValues } from './source-shares.ts';

const grid = { width: 5, height: 4, cellSize: 2, originX: 100, originY: 200, epsg: 32631 };
const cells = grid.width * grid.height;
const habitat = Uint8Array.from({ length: cells }, (_, i) => i % 4);
const heights = Float32Array.from({ length: cells }, (_, i) => (i === 6 ? NaN : i === 7 ? -9999 : i / 10));
const rasters: Record<string, RasterValues> = {
  habitat: { values: habitat, noData: 3 },
  heights: { values: heights, noData: -9999 },
};
const rasterOf = (source: RasterSource) => rasters['file' in source ? source.file : ''];
const classes = { 0: 0, 1: 1, 2: 0.5 };
const curve: [number, number][] = [
  [0.3, 0],
  [1.5, 1],
];
const product: LayerSource = {
  product: [
    { file: 'habitat', classes },
    { file: 'heights', curve },
  ],
};

describe('a product of class table and curve', () => {
  it('is what each cell says, and 0 where either has no data', () => {
    const expected = Array.from({ length: cells }, (_, i) =>
      habitat[i] === 3 || i === 6 || i === 7 ? 0 : [0, 1, 0.5][habitat[i]] * curveShare(curve, heights[i]),
    );
    const shares = sourceShares(product, grid, rasterOf);
    shares.forEach((share, i) => expect(share).toBeCloseTo(expected[i], 6));
    expect([...sourceBytes(product, grid, rasterOf)]).toEqual(Array.from(shares, (s) => Math.round(255 * s)));
    expect(Math.max(...shares)).toBeGreaterThan(0.9);
  });

  it('takes the fill of a factor for its cells without data', () => {
    const filled: LayerSource = {
      product: [
        { file: 'habitat', classes },
        { file: 'heights', curve, fill: 1 },
      ],
    };
    const shares = sourceShares(filled, grid, rasterOf);
    expect(shares[6]).toBe(0.5);
    expect(shares[7]).toBe(0);
    expect(habitat[7]).toBe(3);
  });
});

describe('surveyed places', () => {
  it('shelter as mounds do, the stronger where they overlap, and what a raster says elsewhere', () => {
    const mound = { x: 103, y: 197, radius: 1, strength: 1, halo: 4 };
    const refuge: LayerSource = {
      highest: [{ mounds: [mound, { ...mound, strength: 0.2 }] }, 0.25],
    };
    const bytes = sourceBytes(refuge, grid, rasterOf);
    expect(bytes[1 * 5 + 1]).toBe(255);
    // One cell away: 2 m from the point, 1 m into a halo of 4 m.
    expect(bytes[1 * 5 + 2]).toBe(Math.round(255 * 0.75));
    expect(bytes[3 * 5 + 4]).toBe(64);
  });

  it('fence the cells whose centre they hold', () => {
    const ring: [number, number][] = [
      [100, 200],
      [104, 200],
      [104, 196],
      [100, 196],
    ];
    const fence: LayerSource = { areas: [{ area: { shape: 'polygon', ring }, strength: 0.4 }] };
    const bytes = sourceBytes(fence, grid, rasterOf);
    expect([...bytes].flatMap((byte, i) => (byte > 0 ? [[i, byte]] : []))).toEqual([
      [0, 102],
      [1, 102],
      [5, 102],
      [6, 102],
    ]);
  });

  it('are refused off the grid, by their number', () => {
    const off = { x: 0, y: 0, radius: 1, strength: 1, halo: 0 };
    const on = { ...off, x: 101, y: 199 };
    expect(() => sourceBytes({ mounds: [on, off] }, grid, rasterOf)).toThrow(/^Mound 2 reaches no cell/);
  });
});

it('names the cell of the whole raster that is no share, in whatever stretch it stands', () => {
  const bad: LayerSource = { product: [1, { file: 'heights' }] };
  const read = shareReader(bad, grid, rasterOf);
  read(0, new Float32Array(6));
  expect(() => read(8, new Float32Array(12))).toThrow(/^Cell 11 holds 1\.1/);
  expect(() => sourceBytes(bad, grid, rasterOf)).toThrow(ShareError);
});

it('comes to the same in stretches of any length', () => {
  const source: LayerSource = { highest: [product, { product: [0.5, { file: 'habitat', classes }] }] };
  const whole = sourceShares(source, grid, rasterOf);
  fc.assert(
    fc.property(
      fc.array(fc.integer({ min: 1, max: 7 }), { minLength: cells, maxLength: cells }),
      (lengths) => {
        const read = shareReader(source, grid, rasterOf);
        const out = new Float32Array(cells);
        for (let first = 0, n = 0; first < cells; first += lengths[n++])
          read(first, out.subarray(first, first + lengths[n]));
        expect(out).toEqual(whole);
      },
    ),
  );
});

it('a product with 1 and a highest with 0 change nothing', () => {
  const alone: LayerSource = { file: 'habitat', classes };
  const expected = sourceBytes(alone, grid, rasterOf);
  expect(sourceBytes({ product: [1, alone] }, grid, rasterOf)).toEqual(expected);
  expect(sourceBytes({ highest: [alone, 0] }, grid, rasterOf)).toEqual(expected);
});
