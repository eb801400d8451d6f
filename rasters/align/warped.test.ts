import { describe, expect, it } from 'vitest';
import { inspectRaster, openRaster } from '#rasters/describe/inspect-raster.ts';
import { openBand } from '#rasters/read/band-blocks.ts';
import { toSource } from '#rasters/read/raster-source.ts';
import { loadFixture, warped } from '#rasters/testing/fixtures.ts';
import { alignRaster } from './align-raster.ts';
import type { ResamplingMethod } from './alignment-plan.ts';
import { cellMaps } from './cell-map.ts';
import { planAlignment } from './plan-alignment.ts';
import { sourceWindow } from './source-window.ts';

const methods: Record<string, ResamplingMethod> = {
  near: 'nearest',
  bilinear: 'bilinear',
  average: 'area-weighted',
};
/** The lattice's error in cells, which shows where neighbours differ most, and the kept numbers' last digit. */
const toleranceOf = (values: (number | null)[]) => {
  const data = values.filter((v) => v !== null);
  return 3e-5 * (Math.max(...data) - Math.min(...data)) + 1e-4;
};
/** Nearer than this to the edge of a cell, in cells, the nearest value is anyone's. */
const tie = 2e-4;

/** All cells of a fixture's first band, NaN for no data. */
async function cellsOf(bytes: Uint8Array) {
  const source = toSource(bytes);
  const { description, layout } = await openRaster(source);
  const { noData } = description.bands[0];
  const window = sourceWindow(openBand(source, layout, { index: 1, noData }), {
    noData,
    southUp: false,
    most: 1e6,
  });
  const { width, height } = description;
  return { width, height, values: await window.load({ left: 0, top: 0, width, height }) };
}

describe.each(Object.keys(warped))('%s', (name) => {
  const { source, method, grid, values } = warped[name];

  it('comes out as from gdalwarp, away from missing cells', async () => {
    const bytes = loadFixture(source);
    const description = await inspectRaster(bytes);
    const plan = planAlignment(description, {
      band: 1,
      content: 'amounts',
      grid,
      method: methods[method],
    });
    const { values: ours, noData } = await alignRaster(bytes, plan);
    const { toRaster } = cellMaps(description, grid);
    const cells = await cellsOf(bytes);
    /** Whether all cells that can count for a point hold data, or none does. */
    const around = (x: number, y: number): 'data' | 'none' | 'edge' => {
      const reach = Math.max(1, plan.cellRatio / 2 + 0.5);
      let [held, missing] = [0, 0];
      for (let row = Math.floor(y - reach); row <= y + reach; row++)
        for (let column = Math.floor(x - reach); column <= x + reach; column++) {
          const inside = row >= 0 && column >= 0 && row < cells.height && column < cells.width;
          if (inside && !Number.isNaN(cells.values[row * cells.width + column])) held++;
          else missing++;
        }
      return missing === 0 ? 'data' : held === 0 ? 'none' : 'edge';
    };
    const counts = { data: 0, none: 0, edge: 0 };
    const point = [0, 0];
    for (let i = 0; i < values.length; i++) {
      toRaster((i % grid.width) + 0.5, Math.floor(i / grid.width) + 0.5, point);
      const here = ours[i] === noData || Number.isNaN(ours[i]) ? null : ours[i];
      const there = values[i];
      const place = around(point[0], point[1]);
      const cell = `cell ${i} at ${point.join(', ')}`;
      counts[place]++;
      if (place === 'none') expect(here, cell).toBeNull();
      if (method === 'near') {
        if (point.some((v) => Math.abs(v - Math.round(v)) < tie)) continue;
        expect(here === null ? null : Math.round(here * 1e4) / 1e4, cell).toBe(there);
      } else if (place === 'data') {
        expect(here, cell).not.toBeNull();
        expect(Math.abs((here ?? 0) - (there ?? 0)), cell).toBeLessThan(toleranceOf(values));
      }
    }
    expect(counts.data).toBeGreaterThan(values.length / 4);
  });
});
