import { expect, test } from 'vitest';
import { createReferenceKernel } from '#sim-core/kernel/reference/reference-kernel.ts';
import { createSimdKernel } from '#sim-core/kernel/simd/simd-kernel.ts';
import { philoxKey } from '#sim-core/random/streams.ts';
import { kernelSetup, type SetupInput } from '#sim-core/testing/setups.ts';
import { scatterFragments, type FragmentMap } from './fragments.ts';

const cellSize = 2;
const rates = { fragmentRate: 0.05, fragmentDistance: 12 };

function mapOf(input: SetupInput, given: Partial<FragmentMap> = {}, createKernel = createReferenceKernel) {
  const setup = kernelSetup({ mode: 'counts', cellSize, ...input });
  const kernel = createKernel(setup);
  const { capacity, sites, width, height, boundary } = setup;
  const luck = philoxKey('fragments', 'fragments/0');
  const map = {
    kernel,
    capacity,
    sites,
    width,
    height,
    boundary,
    cellSize,
    years: 1,
    luck,
    replicate: 0,
    ...given,
  };
  return { map, kernel, clumps: kernel.clumps!, sites };
}
const total = (values: ArrayLike<number>) => Array.from(values).reduce((sum, v) => sum + v, 0);

/** One full cell amid empty ground, with so many sites that no piece finds one taken. */
function scattered(boundary: 'mirror' | 'bare', side = 121, distance = 12, at = (side * side - 1) / 2) {
  const sites = new Uint32Array(256).fill(60_000, 1);
  const clumps = new Uint32Array(side * side);
  clumps[at] = sites[255];
  const { map, clumps: n } = mapOf({ width: side, height: side, boundary, clumps, sites });
  // In one step, as what has taken root would break pieces in the next.
  const rooted = scatterFragments({ fragmentRate: 2000, fragmentDistance: distance }, 0, map);
  const landings = Array.from(n, (there, cell) => (cell === at ? 0 : there));
  return { rooted, landings, side, pieces: 2000 * cellSize * cellSize };
}

test('pieces go as far as they should, evenly in all directions', () => {
  const { landings, side, rooted, pieces } = scattered('mirror');
  const middle = (side - 1) / 2;
  let [distance, count, east, south] = [0, 0, 0, 0];
  const octants = new Float64Array(8);
  landings.forEach((there, cell) => {
    if (there === 0) return;
    const x = (cell % side) - middle;
    const y = Math.floor(cell / side) - middle;
    count += there;
    distance += there * Math.sqrt(x * x + y * y);
    east += there * Math.sign(x);
    south += there * Math.sign(y);
    if (Math.abs(x) > 2 && Math.abs(y) > 2 && Math.abs(x) !== Math.abs(y))
      octants[(x > 0 ? 1 : 0) + (y > 0 ? 2 : 0) + (Math.abs(x) > Math.abs(y) ? 4 : 0)] += there;
  });
  // A Poisson number of mean 8,000; the cell itself is full and takes none, which costs those that stay in it.
  expect(pieces).toBe(8000);
  expect(rooted).toBe(count);
  expect(count).toBeGreaterThan(0.8 * pieces);
  expect(count).toBeLessThan(pieces);
  // Mean distance L = 12 m, in cells of 2 m; those that stayed at home (within some half cell) are missing.
  const mean = (distance * cellSize) / pieces;
  expect(Math.abs(mean - 12)).toBeLessThan((4 * 12) / Math.sqrt(pieces) + 0.15);
  expect(Math.abs(east)).toBeLessThan(4 * Math.sqrt(count));
  expect(Math.abs(south)).toBeLessThan(4 * Math.sqrt(count));
  const even = total(octants) / 8;
  // χ² with 7 degrees of freedom exceeds 24.322 with chance 0.001 (NIST/SEMATECH e-Handbook).
  expect(octants.reduce((sum, o) => sum + (o - even) ** 2 / even, 0)).toBeLessThan(24.322);
});

test('over the edge pieces are lost when it is bare and come back when it mirrors', () => {
  const corner = (boundary: 'mirror' | 'bare') => scattered(boundary, 15, 12, 0);
  const mirror = corner('mirror');
  const bare = corner('bare');
  // From a corner three of four directions leave the map, but for flights that end within a cell of it.
  expect(bare.rooted / bare.pieces).toBeLessThan(0.3);
  expect(bare.rooted / bare.pieces).toBeGreaterThan(0.2);
  expect(mirror.rooted / mirror.pieces).toBeGreaterThan(0.8);
});

test('as many break off as ρ Δt ΣC Δx² says, from where the cover is', () => {
  // Flights so short that what lands tells where it broke off; 2,000 sites a cell, a tenth to nine tenths taken.
  const width = 90;
  const sites = new Uint32Array(256).fill(2000, 1);
  const clumps = Uint32Array.from({ length: width * 30 }, (_, i) =>
    i % width < 30 ? 200 : i % width < 60 ? 0 : 1800,
  );
  const { map, clumps: after } = mapOf({ width, height: 30, clumps, sites }, { years: 0.5 });
  scatterFragments({ fragmentRate: 4, fragmentDistance: 0.001 }, 0, map);
  const gained = [0, 0, 0];
  after.forEach((n, i) => {
    gained[Math.floor((i % width) / 30)] += n - clumps[i];
  });
  // 900 cells of 4 m² at C = 0.1 and 0.9, of which 0.9 and 0.1 find their site free: Poisson means of 648 both.
  const expected = 4 * 0.5 * 900 * 4 * 0.1 * 0.9;
  expect(Math.abs(gained[0] - expected)).toBeLessThan(4 * Math.sqrt(expected));
  expect(Math.abs(gained[2] - expected)).toBeLessThan(4 * Math.sqrt(expected));
  expect(gained[1]).toBe(0);
});

test('cells have luck of their own, those that share a block of words too', () => {
  const sites = new Uint32Array(256).fill(10_000, 1);
  const [width, height] = [80, 40];
  const thin = new Uint32Array(width * height).fill(1000);
  const { map, clumps } = mapOf({ width, height, clumps: thin, sites });
  scatterFragments({ fragmentRate: 5, fragmentDistance: 0.001 }, 0, map);
  const pieces = Array.from(clumps, (n) => n - 1000);
  const mean = total(pieces) / pieces.length;
  const covariance = (other: number) =>
    total(pieces.map((n, i) => (i % 4 ? 0 : (n - mean) * (pieces[i + other] - mean)))) / (pieces.length / 4);
  // Of 800 pairs a correlation is within 4/√800 of none.
  for (const other of [1, 2, 3]) expect(Math.abs(covariance(other) / covariance(0))).toBeLessThan(0.15);
});

test.each([
  ['reference', createReferenceKernel],
  ['shipping', createSimdKernel],
])(
  'sites are never overfilled, nothing grows where nothing can, and the kernel hears of it: %s',
  (_, createKernel) => {
    const [width, height] = [60, 40];
    const capacity = Uint8Array.from({ length: width * height }, (_, i) => [255, 0, 40, 200][i % 4]);
    const clumps = Uint32Array.from(capacity, (k, i) => (k > 0 && i % width < 10 ? 2 : 0));
    const { map, kernel, sites } = mapOf({ width, height, capacity, clumps }, {}, createKernel);
    const before = total(kernel.clumps!);
    const rooted = scatterFragments({ fragmentRate: 2, fragmentDistance: 30 }, 3, map);
    expect(rooted).toBeGreaterThan(100);
    expect(total(kernel.clumps!)).toBe(before + rooted);
    kernel.clumps!.forEach((n, i) => {
      expect(n).toBeLessThanOrEqual(sites[capacity[i]]);
      expect(kernel.cover[i]).toBe(n ? Math.fround((capacity[i] / 255) * (n / sites[capacity[i]])) : 0);
    });
    // The step after must not take a cell for bare in which a piece has just taken root.
    const far = Array.from(kernel.clumps!).findIndex((n, i) => n > 0 && i % width > 30);
    expect(far).toBeGreaterThan(0);
    const plodding = createKernel(
      kernelSetup({
        width,
        height,
        capacity,
        mode: 'counts',
        cellSize,
        clumps: Uint32Array.from(kernel.clumps!),
        skip: false,
      }),
    );
    kernel.step(4, 0);
    plodding.step(4, 0);
    expect(kernel.cover).toEqual(plodding.cover);
  },
);

test('the same luck gives the same pieces; another replicate others; mean-field none', () => {
  const input = { width: 40, height: 40, clumps: new Uint32Array(1600).fill(3) };
  const after = (given: Partial<FragmentMap>) => {
    const { map, clumps } = mapOf(input, given);
    scatterFragments(rates, 7, map);
    return clumps.join();
  };
  expect(after({})).toBe(after({}));
  expect(after({ replicate: 1 })).not.toBe(after({}));
  const { map, kernel } = mapOf({
    width: 4,
    height: 4,
    mode: 'mean-field',
    cover: new Float32Array(16).fill(1),
  });
  expect(scatterFragments({ fragmentRate: 10, fragmentDistance: 1 }, 0, map)).toBe(0);
  expect(total(kernel.cover)).toBe(16);
});
