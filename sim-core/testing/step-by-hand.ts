import { describe, expect, test } from 'vitest';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { binomialQuantile } from '#sim-core/random/binomial.ts';
import { cellLuck } from '#sim-core/random/cell-luck.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
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

  /** Chance of standing for a standing site and for a free one, and C', of each cell. */
  function byHand(from: Float32Array, boundary: 'mirror' | 'bare') {
    const taps = discreteGaussian(0.8);
    const weight = (d: number) => taps[Math.abs(d)] ?? 0;
    const sigma = rates.carryOver ** dt;
    const beta = Math.exp(rates.fillRate * dt) - sigma;
    const reach = taps.length - 1;
    const inside = (at: number, n: number): number => {
      if (at >= 0 && at < n) return at;
      if (boundary === 'bare') return -1;
      return inside(at < 0 ? -1 - at : 2 * n - 1 - at, n);
    };
    return Array.from({ length: cells }, (_, i) => {
      const K = capacity[i] / 255;
      if (K === 0) return { standing: 0, free: 0, next: 0, lost: 0, drought: 0 };
      let phi = 0;
      for (let dy = -reach; dy <= reach; dy++)
        for (let dx = -reach; dx <= reach; dx++) {
          const x = inside((i % width) + dx, width);
          const y = inside(Math.floor(i / width) + dy, height);
          if (x >= 0 && y >= 0) phi += weight(dx) * weight(dy) * from[y * width + x];
        }
      phi /= K;
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
      const h = rates.backgroundLoss + drought;
      const S = Math.exp(-h * dt);
      const before = sigma * from[i] + Math.max(K - sigma * from[i], 0) * q;
      return {
        standing: S * (sigma + (1 - sigma) * q),
        free: S * q,
        next: S * before,
        lost: (1 - S) * before,
        drought: drought / h,
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
