import { describe, expect, it } from 'vitest';
import { toShares } from '#sim-core/grid/ground.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import { summarise } from '#rasters/read/summary.ts';
import { demoClasses, habitatValue } from './classes.ts';
import { makeLandscape } from './landscape.ts';
import { hash, rough } from './noise.ts';
import { demoGrid, demoMounds, demoRasters } from './sallow-reach.ts';

const rasters = demoRasters();
const read = async (name: string) =>
  readRaster(rasters.find((r) => r.name === name)?.bytes ?? new Uint8Array());

describe('the rasters of the invented site', () => {
  it('are GeoTIFFs on one grid', async () => {
    for (const { name } of rasters) {
      const raster = await read(name);
      expect(raster.grid).toEqual(demoGrid);
      expect(raster.crsName).toBe('WGS 84 / UTM zone 31N');
    }
    expect(rasters.map((r) => r.fileName)).toEqual([
      'habitat.tif',
      'cover.tif',
      'refuge.tif',
      'elevation.tif',
    ]);
  });

  it('say that they are invented', () => {
    for (const { bytes } of rasters) expect(Buffer.from(bytes).includes('invented demo data')).toBe(true);
  });

  it('are the same bytes each time', () => {
    demoRasters().forEach(({ bytes }, i) => expect(Buffer.compare(bytes, rasters[i].bytes)).toBe(0));
  });

  it('habitat holds every class of the table and no other', async () => {
    const summary = summarise(await read('habitat'));
    expect(summary.classCounts?.map((c) => c.value)).toEqual(demoClasses.map((c) => c.value));
    expect(summary.noDataShare).toBe(0);
    for (const { cells } of summary.classCounts ?? []) expect(cells).toBeGreaterThan(2000);
  });

  it('elevation lies as its classes do: creeks lowest, then banks, platforms, levees highest', async () => {
    const [habitat, elevation] = [await read('habitat'), await read('elevation')];
    const { creek, bank, low, high, levee } = habitatValue;
    const means = [creek, bank, low, high, levee].map((of) => {
      const heights = Array.from(elevation.values).filter((_, i) => habitat.values[i] === of);
      return heights.reduce((sum, z) => sum + z, 0) / heights.length;
    });
    expect(means).toEqual([...means].sort((a, b) => a - b));
    expect(means[0]).toBeLessThan(0);
    expect(elevation.values.every((z) => z > -2 && z < 1.2)).toBe(true);
  });

  it('cover is a share below the capacity of its class, unseen over water alone', async () => {
    const [habitat, cover] = [await read('habitat'), await read('cover')];
    const capacity = new Map(demoClasses.map((c) => [c.value, c.capacity]));
    let above = 0;
    let unseen = 0;
    cover.values.forEach((share, i) => {
      const water = habitat.values[i] === habitatValue.creek;
      if (share === cover.noData ? !water : share < 0 || share > (capacity.get(habitat.values[i]) ?? 0))
        above++;
      if (water && share !== cover.noData) unseen++;
    });
    expect([above, unseen]).toEqual([0, 0]);
    expect(summarise(cover).unit).toBe('share');
    expect(toShares(cover.values, { noData: cover.noData }).every((s) => s >= 0 && s <= 1)).toBe(true);
  });

  it('show a marsh of which some two fifths died', async () => {
    const { values, noData } = await read('cover');
    const land = values.filter((v) => v !== noData);
    expect(land.filter((v) => v === 0).length / land.length).toBeCloseTo(0.42, 1);
    const standing = land.filter((v) => v > 0.4);
    const mean = [...standing].reduce((sum, v) => sum + v, 0) / standing.length;
    expect(mean).toBeGreaterThan(0.6);
    expect(mean).toBeLessThan(0.85);
  });

  it('refuge is strong on mounds and zero on most ground', async () => {
    const summary = summarise(await read('refuge'));
    expect(summary.maximum).toBeGreaterThan(0.9);
    expect(summary.maximum).toBeLessThanOrEqual(1);
    expect(summary.histogram[0] / (demoGrid.width * demoGrid.height)).toBeGreaterThan(0.98);
  });
});

describe('the landscape', () => {
  const { mounds, bareAt, cover, refuge } = makeLandscape(demoGrid.width, demoGrid.height, 2026);
  const cellOf = (x: number, y: number) => Math.floor(y) * demoGrid.width + Math.floor(x);

  it('has about sixty surveyed mounds on the pans, apart from each other, with survivors on most', () => {
    const onPans = mounds.filter((m) => bareAt(m.x, m.y));
    expect(onPans.length).toBeGreaterThan(50);
    const alive = onPans.filter((m) => cover[cellOf(m.x, m.y)] > 0.3).length;
    expect(alive / onPans.length).toBeGreaterThan(0.8);
    expect(alive / onPans.length).toBeLessThan(1);
    expect(mounds.every((m) => refuge[cellOf(m.x, m.y)] > 0.5)).toBe(true);
    expect(closest(mounds)).toBeGreaterThanOrEqual(17);
  });

  it('offers forty places for mounds on bare ground, at least 14 m apart', () => {
    const places = demoMounds();
    expect(places).toHaveLength(40);
    expect(closest(places)).toBeGreaterThanOrEqual(14);
    for (const { x, y } of places) {
      const [column, row] = [x - demoGrid.originX, demoGrid.originY - y];
      expect(bareAt(column, row)).toBe(true);
      expect(cover[cellOf(column, row)]).toBe(0);
    }
  });

  it('comes out otherwise from another seed', () => {
    expect(makeLandscape(64, 48, 1).cover).not.toEqual(makeLandscape(64, 48, 2).cover);
  });
});

const closest = (points: readonly { x: number; y: number }[]): number =>
  Math.sqrt(
    Math.min(
      ...points.flatMap((a, i) => points.slice(i + 1).map((b) => (a.x - b.x) ** 2 + (a.y - b.y) ** 2)),
    ),
  );

describe('noise', () => {
  it('of the hash is spread evenly and without neighbours alike', () => {
    const n = 20_000;
    const u = Array.from({ length: n }, (_, i) => hash(5, i % 200, Math.floor(i / 200)));
    const mean = u.reduce((a, b) => a + b, 0) / n;
    // Standard errors for 20,000 uniform draws: 0.002 for the mean, 0.007 for the correlation; four of each.
    expect(Math.abs(mean - 0.5)).toBeLessThan(0.0082);
    const lag = u.slice(1).reduce((sum, v, i) => sum + (v - 0.5) * (u[i] - 0.5), 0) / (n / 12);
    expect(Math.abs(lag)).toBeLessThan(0.028);
  });

  it('is smooth: close places are alike, far ones are not', () => {
    const at = (x: number) => rough(9, x, 3.3, 20, 1);
    for (let x = 0; x < 200; x++) expect(Math.abs(at(x + 0.1) - at(x))).toBeLessThan(0.03);
    expect(Math.max(...Array.from({ length: 50 }, (_, k) => at(20 * k)))).toBeGreaterThan(0.5);
  });
});
