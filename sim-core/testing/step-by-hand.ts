import { describe, expect, test } from 'vitest';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { binomialQuantile } from '#sim-core/random/binomial.ts';
import { cellLuck } from '#sim-core/random/cell-luck.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { processesSchema } from '#sim-core/spec/processes.ts';
import { discreteGaussian } from '#sim-core/theory/spread-kernel.ts';
import { kernelSetup } from './setups.ts';

/**
 * The step written a second time, cell by cell from the equations with `Math` and a full two-dimensional kernel, on a
 * map small enough for that.
 */
export function describeStepByHand(name: string, createKernel: CreateKernel): void {
  const width = 7;
  const height = 5;
  const cells = width * height;
  const layer = (of: (i: number) => number) => Uint8Array.from({ length: cells }, (_, i) => of(i));
  const capacity = layer((i) => [255, 200, 0, 128, 40][i % 5]);
  const vigour = layer((i) => 255 - i);
  const exposure = layer((i) => i * 6);
  const refuge = layer((i) => (i % 4) * 80);
  const cover = Float32Array.from({ length: cells }, (_, i) => ((i % 3) / 3) * (capacity[i] / 255));
  const rates = { ...defaultRates, backgroundLoss: 0.2, seedlingRate: 0.03, crowding: 0.7 };
  const dt = 0.5;
  const X = -1.8;
  const fence = layer((i) => (i % 6) * 51);
  const G = Float32Array.from({ length: cells }, (_, i) => (i * 13) % 40);
  const herd = {
    ...processesSchema.parse({ grazers: {} }).grazers!,
    grazingRate: 0.03,
    grazerLimit: 42,
    refugePredation: 0.8,
  };

  /** Σ T(dx) T(dy) of what stands around cell i. */
  function spread(values: Float32Array, variance: number, boundary: 'mirror' | 'bare', i: number): number {
    const taps = discreteGaussian(variance);
    const weight = (d: number) => taps[Math.abs(d)] ?? 0;
    const reach = taps.length - 1;
    const inside = (at: number, n: number): number => {
      if (at >= 0 && at < n) return at;
      if (boundary === 'bare') return -1;
      return inside(at < 0 ? -1 - at : 2 * n - 1 - at, n);
    };
    let sum = 0;
    for (let dy = -reach; dy <= reach; dy++)
      for (let dx = -reach; dx <= reach; dx++) {
        const x = inside((i % width) + dx, width);
        const y = inside(Math.floor(i / width) + dy, height);
        if (x >= 0 && y >= 0) sum += weight(dx) * weight(dy) * values[y * width + x];
      }
    return sum;
  }

  /** Chance of standing for a standing site and for a free one, and C', of each cell. */
  function byHand(from: Float32Array, boundary: 'mirror' | 'bare', grazed = false) {
    const sigma = rates.carryOver ** dt;
    const beta = Math.exp(rates.fillRate * dt) - sigma;
    return Array.from({ length: cells }, (_, i) => {
      const K = capacity[i] / 255;
      if (K === 0) return { standing: 0, free: 0, next: 0, lost: 0, drought: 0, grazing: 0 };
      const phi = spread(from, 0.8, boundary, i) / K;
      const phi1 = Math.min(phi, 1);
      const [g, E, M] = [vigour[i] / 255, exposure[i] / 255, refuge[i] / 255];
      const q =
        1 -
        Math.exp(
          -(
            beta * g * (1 + rates.refugeGrowth * M) * Math.exp(-rates.crowding * (1 - E) * phi1) * phi +
            rates.seedlingRate * dt
          ),
        );
      const critical =
        rates.tolerance + rates.exposureShift * E - rates.refugeShift * M - rates.neighbourShift * phi1;
      const drought = rates.droughtLoss / (1 + Math.exp((X - critical) / rates.lossWidth));
      const eaten = grazed ? herd.grazingRate * (1 - fence[i] / 255) * G[i] : 0;
      const h = rates.backgroundLoss + drought + eaten;
      const S = Math.exp(-h * dt);
      const before = sigma * from[i] + Math.max(K - sigma * from[i], 0) * q;
      return {
        standing: S * (sigma + (1 - sigma) * q),
        free: S * q,
        next: S * before,
        lost: (1 - S) * before,
        drought: drought / h,
        grazing: eaten / h,
      };
    });
  }

  describe(`${name}: one step by hand`, () => {
    test.each(['mirror', 'bare'] as const)('mean-field, %s boundary', (boundary) => {
      const setup = kernelSetup({
        width,
        height,
        capacity,
        vigour,
        exposure,
        refuge,
        cover,
        boundary,
        rates,
        variance: 0.8,
        stepsPerYear: 1 / dt,
      });
      const kernel = createKernel(setup);
      const losses = kernel.step(0, X);
      const expected = byHand(cover, boundary);
      // C is held in 32 bits: half a unit in the last place is 3e−8 of it.
      expected.forEach(({ next }, i) => expect(Math.abs(kernel.cover[i] - next)).toBeLessThan(1e-7));
      const total = (part: (e: (typeof expected)[number]) => number) =>
        expected.reduce((sum, e) => sum + part(e), 0);
      expect(losses.drought).toBeCloseTo(
        total((e) => e.lost * e.drought),
        6,
      );
      expect(losses.background).toBeCloseTo(
        total((e) => e.lost * (1 - e.drought)),
        6,
      );
      expect(losses.drought).toBeGreaterThan(0.1);
    });

    test.each(['mirror', 'bare'] as const)('mean-field with grazers, %s boundary', (boundary) => {
      const setup = kernelSetup({
        ...{ width, height, capacity, vigour, exposure, refuge, cover, boundary, rates },
        variance: 0.8,
        stepsPerYear: 1 / dt,
        grazers: { rates: herd, variance: 1.7, fence },
      });
      const kernel = createKernel(setup);
      kernel.grazers!.set(G);
      const losses = kernel.step(0, X);
      const expected = byHand(cover, boundary, true);
      expected.forEach(({ next }, i) => expect(Math.abs(kernel.cover[i] - next)).toBeLessThan(1e-7));
      const total = (part: (e: (typeof expected)[number]) => number) =>
        expected.reduce((sum, e) => sum + part(e), 0);
      expect(losses.grazing).toBeCloseTo(
        total((e) => e.lost * e.grazing),
        5,
      );
      expect(losses.drought).toBeCloseTo(
        total((e) => e.lost * e.drought),
        5,
      );
      expect(losses.drought + losses.background + losses.grazing).toBeCloseTo(
        total((e) => e.lost),
        5,
      );
      expect(losses.grazing).toBeGreaterThan(0.1);

      const D = (-1 - X) / 3;
      let limited = 0;
      for (let i = 0; i < cells; i++) {
        const K = capacity[i] / 255;
        const phi1 = K > 0 ? Math.min(1, spread(cover, 0.8, boundary, i) / K) : 0;
        const { grazerGrowth, grazerMortality, predation, refugePredation, grazerImmigration } = herd;
        const rate =
          grazerGrowth * phi1 - grazerMortality - predation * (1 - D) - (refugePredation * refuge[i]) / 255;
        const free = spread(G, 1.7, boundary, i) * Math.exp(dt * rate) + grazerImmigration * dt;
        if (free > herd.grazerLimit) limited++;
        expect(Math.abs(kernel.grazers![i] / Math.min(herd.grazerLimit, free) - 1)).toBeLessThan(1e-6);
      }
      expect(limited).toBeLessThan(cells);
    });

    test('counts: two quantiles at the luck of the cell', () => {
      const setup = kernelSetup({
        width,
        height,
        capacity,
        vigour,
        exposure,
        refuge,
        mode: 'counts',
        rates,
        variance: 0.8,
        stepsPerYear: 1 / dt,
        replicate: 3,
        luck: { k0: 77, k1: 88 },
        clumps: Uint32Array.from(cover, (_, i) => (capacity[i] === 0 ? 0 : i % 2)),
      });
      const kernel = createKernel(setup);
      const before = Uint32Array.from(kernel.clumps!);
      const expected = byHand(kernel.cover.slice(), 'mirror');
      kernel.step(11, X);
      const luck = cellLuck({ k0: 77, k1: 88 }, 11, 3, 0);
      expected.forEach(({ standing, free }, i) => {
        const N = setup.sites[capacity[i]];
        const draws = luck(i);
        expect(kernel.clumps![i]).toBe(
          binomialQuantile(draws.standing, before[i], standing) +
            binomialQuantile(draws.free, N - before[i], free),
        );
      });
      expect(kernel.clumps!.some((n, i) => n !== before[i])).toBe(true);
    });
  });
}
