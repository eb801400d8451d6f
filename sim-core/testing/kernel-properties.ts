import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { clumpSites } from '#sim-core/kernel/clump-sites.ts';
import type { CreateKernel, KernelSetup } from '#sim-core/kernel/kernel.ts';
import { defaultRates, rateNames, parameters, type Rates } from '#sim-core/spec/parameters.ts';
import { kernelSetup } from './setups.ts';

/** A small map, all of whose layers and rates are drawn. */
interface Case {
  setup: KernelSetup;
  drought: number[];
}

const bytes = (cells: number) => fc.uint8Array({ minLength: cells, maxLength: cells });
/** Rates drawn over what is reasonable for plants, not over all that the form lets through. */
const rates: fc.Arbitrary<Rates> = fc
  .record({
    fillRate: fc.double({ min: 0.1, max: 3, noNaN: true }),
    carryOver: fc.double({ min: 0, max: 1, noNaN: true }),
    seedlingRate: fc.constantFrom(0, 0, 0.02),
    backgroundLoss: fc.constantFrom(0, 0.1),
    droughtLoss: fc.constantFrom(0, 3, 10),
    lossWidth: fc.constantFrom(0.05, 0.3),
    crowding: fc.constantFrom(0, 2),
    neighbourShift: fc.constantFrom(0, 1),
    refugeGrowth: fc.constantFrom(0, 1),
  })
  .map((some) => ({ ...defaultRates, ...some }));

const grazers = fc.record({
  variance: fc.constantFrom(0.2, 5),
  rates: fc.record({
    initialGrazers: fc.constantFrom(0, 30),
    grazingRate: fc.constantFrom(0, 0.05),
    predation: fc.constantFrom(0, 3),
    grazerImmigration: fc.constantFrom(0, 5),
    grazerLimit: fc.constantFrom(20, 500),
  }),
});

function cases(mode: KernelSetup['mode'], given: Partial<Rates> = {}): fc.Arbitrary<Case> {
  return fc
    .record({
      width: fc.integer({ min: 1, max: 9 }),
      height: fc.integer({ min: 1, max: 9 }),
      rates: rates.map((r) => ({ ...r, ...given })),
      variance: fc.constantFrom(0.01, 0.4, 3),
      boundary: fc.constantFrom('mirror' as const, 'bare' as const),
      stepsPerYear: fc.constantFrom(1, 4),
      grazers: fc.option(grazers, { nil: undefined, freq: 2 }),
      drought: fc.array(fc.double({ min: -6, max: 3, noNaN: true }), { minLength: 1, maxLength: 6 }),
    })
    .chain((drawn) => {
      const cells = drawn.width * drawn.height;
      return fc
        .record({
          capacity: fc.array(fc.constantFrom(0, 1, 90, 255, 255), { minLength: cells, maxLength: cells }),
          vigour: bytes(cells),
          exposure: bytes(cells),
          refuge: bytes(cells),
          fence: bytes(cells),
          share: fc.array(fc.constantFrom(0, 0, 0.3, 1), { minLength: cells, maxLength: cells }),
        })
        .map((layers) => {
          const capacity = Uint8Array.from(layers.capacity);
          const sites = clumpSites(drawn.rates.clumpsPerSquareMetre, 2);
          return {
            drought: drawn.drought,
            setup: kernelSetup({
              ...drawn,
              ...layers,
              mode,
              capacity,
              sites,
              grazers: drawn.grazers && { ...drawn.grazers, fence: layers.fence },
              cover: Float32Array.from(layers.share, (s, i) => s * Math.fround(capacity[i] / 255)),
              clumps: Uint32Array.from(layers.share, (s, i) => Math.floor(s * sites[capacity[i]])),
            }),
          };
        });
    });
}

function runKernel(createKernel: CreateKernel, setup: KernelSetup, drought: readonly number[]) {
  const kernel = createKernel(setup);
  const losses = drought.map((x, index) => kernel.step(index, x));
  return { kernel, losses };
}

const modes = ['mean-field', 'counts'] as const;

/** Properties that every kernel must have, whatever it is written in. */
export function describeKernelProperties(name: string, createKernel: CreateKernel): void {
  const check = <T>(arbitrary: fc.Arbitrary<T>, hold: (drawn: T) => void, numRuns = 150) =>
    fc.assert(fc.property(arbitrary, hold), { numRuns, seed: 20 });

  describe(`${name}: properties`, () => {
    test.each(modes)('0 ≤ C ≤ K, 0 ≤ G ≤ G_max, and losses are no less than nothing (%s)', (mode) => {
      check(cases(mode), ({ setup, drought }) => {
        const { kernel, losses } = runKernel(createKernel, setup, drought);
        kernel.cover.forEach((c, i) => {
          expect(c).toBeGreaterThanOrEqual(0);
          expect(c).toBeLessThanOrEqual(Math.fround(setup.capacity[i] / 255));
          if (kernel.clumps) {
            const N = setup.sites[setup.capacity[i]];
            expect(kernel.clumps[i]).toBeLessThanOrEqual(N);
            expect(c).toBe(N ? Math.fround((setup.capacity[i] / 255) * (kernel.clumps[i] / N)) : 0);
          }
        });
        for (const { drought: d, background, grazing } of losses) {
          expect(d).toBeGreaterThanOrEqual(0);
          expect(background).toBeGreaterThanOrEqual(0);
          expect(grazing).toBeGreaterThanOrEqual(0);
          if (!setup.grazing || setup.grazing.rates.grazingRate === 0) expect(grazing).toBe(0);
        }
        const most = Math.fround(setup.grazing?.rates.grazerLimit ?? 0);
        kernel.grazers?.forEach((g) => {
          expect(g).toBeGreaterThanOrEqual(0);
          expect(g).toBeLessThanOrEqual(most);
        });
      });
    });

    test.each(modes)(
      'nothing comes from nothing without seedlings; with them something does (%s)',
      (mode) => {
        const bare = (setup: KernelSetup): KernelSetup => ({
          ...setup,
          cover: new Float32Array(setup.capacity.length),
          clumps: new Uint32Array(setup.capacity.length),
        });
        check(cases(mode, { seedlingRate: 0 }), ({ setup, drought }) => {
          expect(runKernel(createKernel, bare(setup), drought).kernel.cover.every((c) => c === 0)).toBe(true);
        });
        const seeded = bare(kernelSetup({ width: 8, height: 8, mode, rates: { seedlingRate: 0.2 } }));
        expect(runKernel(createKernel, seeded, [0]).kernel.cover.some((c) => c > 0)).toBe(true);
      },
    );

    test.each(modes)('skipping what is bare changes no bit (%s)', (mode) => {
      check(cases(mode), ({ setup, drought }) => {
        const skipping = runKernel(createKernel, setup, drought);
        const plodding = runKernel(createKernel, { ...setup, skip: false }, drought);
        expect(skipping.kernel.cover).toEqual(plodding.kernel.cover);
        expect(skipping.losses).toEqual(plodding.losses);
        expect(skipping.kernel.grazers).toEqual(plodding.kernel.grazers);
      });
    });

    test.each(modes)('the same setup twice gives the same bits (%s)', (mode) => {
      check(cases(mode), ({ setup, drought }) => {
        const once = runKernel(createKernel, setup, drought);
        expect(runKernel(createKernel, setup, drought).kernel.cover).toEqual(once.kernel.cover);
      });
    });

    test('a mirrored map gives the mirrored map, to the last bit (mean-field)', () => {
      check(cases('mean-field'), ({ setup, drought }) => {
        const { width, height } = setup;
        const flips = [
          (i: number) => i - (i % width) + (width - 1 - (i % width)),
          (i: number) => (height - 1 - Math.floor(i / width)) * width + (i % width),
        ];
        const straight = runKernel(createKernel, setup, drought).kernel;
        for (const flip of flips) {
          const flipped = <T extends Uint8Array | Float32Array>(a: T) => a.map((_, i) => a[flip(i)]) as T;
          const mirrored = runKernel(
            createKernel,
            {
              ...setup,
              capacity: flipped(setup.capacity),
              vigour: flipped(setup.vigour),
              exposure: flipped(setup.exposure),
              refuge: flipped(setup.refuge),
              cover: setup.cover && flipped(setup.cover),
              grazing: setup.grazing && { ...setup.grazing, fence: flipped(setup.grazing.fence) },
            },
            drought,
          ).kernel;
          expect(flipped(mirrored.cover)).toEqual(straight.cover);
          expect(mirrored.grazers && flipped(mirrored.grazers)).toEqual(straight.grazers);
        }
      });
    });

    test('a patch far from any edge grows the same wherever it stands (mean-field)', () => {
      const side = 40;
      const grownAt = (column: number, row: number) => {
        const cover = new Float32Array(side * side);
        cover[row * side + column] = 0.7;
        cover[row * side + column + 1] = 0.2;
        const { kernel } = runKernel(
          createKernel,
          kernelSetup({ width: side, height: side, cover, rates: { backgroundLoss: 0.1 } }),
          [0, -2, 1],
        );
        const around: number[] = [];
        for (let y = -14; y <= 14; y++)
          for (let x = -14; x <= 14; x++) around.push(kernel.cover[(row + y) * side + column + x]);
        return around;
      };
      const there = grownAt(16, 15);
      expect(there.filter((c) => c > 0).length).toBeGreaterThan(200);
      expect(grownAt(22, 24)).toEqual(there);
    });

    test('counts come to the mean-field step on average', () => {
      const width = 6;
      const height = 5;
      const cells = width * height;
      const capacity = Uint8Array.from({ length: cells }, (_, i) => [0, 60, 128, 255][i % 4]);
      const sites = clumpSites(1, 2);
      const clumps = Uint32Array.from(capacity, (k, i) => Math.min(sites[k], i % 5));
      const cover = Float32Array.from(capacity, (k, i) =>
        sites[k] ? (k / 255) * (clumps[i] / sites[k]) : 0,
      );
      const exposure = Uint8Array.from({ length: cells }, (_, i) => i * 7);
      const refuge = Uint8Array.from({ length: cells }, (_, i) => (i % 7) * 36);
      const given = { width, height, capacity, sites, clumps, cover, exposure, refuge };
      const some: Partial<Rates> = { crowding: 1, backgroundLoss: 0.2, seedlingRate: 0.05 };
      const expected = runKernel(createKernel, kernelSetup({ ...given, rates: some }), [-2.5]);
      const sums = new Float64Array(cells);
      const squares = new Float64Array(cells);
      const replicates = 4000;
      for (let replicate = 0; replicate < replicates; replicate++) {
        const setup = kernelSetup({ ...given, rates: some, mode: 'counts', replicate });
        const { kernel, losses } = runKernel(createKernel, setup, [-2.5]);
        expect(losses[0].drought).toBeCloseTo(expected.losses[0].drought, 5);
        kernel.cover.forEach((c, i) => {
          sums[i] += c;
          squares[i] += c * c;
        });
      }
      for (let i = 0; i < cells; i++) {
        const mean = sums[i] / replicates;
        const error = Math.sqrt((squares[i] / replicates - mean * mean) / replicates);
        // 4.5 standard errors: over 30 cells the chance of a false alarm is about 1 in 5,000 for a new seed.
        expect(Math.abs(mean - expected.kernel.cover[i])).toBeLessThanOrEqual(4.5 * error + 1e-6);
      }
      expect(sums.some((s) => s > 0)).toBe(true);
    });

    test('with the same luck, a step on better ground never gives less (counts)', () => {
      // Every chance is above, and so is every quantile. Not so for one more clump at the start: that takes a free site
      // away, and free and standing sites have a draw each.
      check(
        fc.tuple(cases('counts'), fc.nat(), fc.integer({ min: 1, max: 255 })),
        ([{ setup, drought }, at, raise]) => {
          const low = createKernel(setup);
          low.step(0, drought[0]);
          for (const layer of ['refuge', 'vigour'] as const) {
            const better = setup[layer].slice();
            const cell = at % better.length;
            better[cell] = Math.min(255, better[cell] + raise);
            const high = createKernel({ ...setup, [layer]: better });
            high.step(0, drought[0]);
            low.clumps!.forEach((n, i) => expect(high.clumps![i]).toBeGreaterThanOrEqual(n));
          }
          const wetter = createKernel(setup);
          wetter.step(0, drought[0] + 1);
          low.clumps!.forEach((n, i) => expect(wetter.clumps![i]).toBeGreaterThanOrEqual(n));
        },
      );
    });

    test('every rate that a step reads changes it', () => {
      // Each against a base in which it matters; the others do not reach the kernel (lateral spread, clump sites).
      const side = 6;
      const ramp = (scale: number) => Uint8Array.from({ length: side * side }, (_, i) => i * scale);
      const grown = (changed: Partial<Rates>) => {
        const setup = kernelSetup({
          width: side,
          height: side,
          exposure: ramp(5),
          refuge: ramp(3),
          cover: Float32Array.from({ length: side * side }, (_, i) => (i % 3) / 4),
          rates: { backgroundLoss: 0.1, seedlingRate: 0.01, crowding: 0.5, ...changed },
        });
        return [...runKernel(createKernel, setup, [-2]).kernel.cover].join();
      };
      const base = grown({});
      for (const name of rateNames) {
        if (name === 'lateralSpread' || name === 'clumpsPerSquareMetre') continue;
        const { min, max } = parameters[name];
        expect(grown({ [name]: (min + max) / 2.03 }), name).not.toBe(base);
      }
    });
  });
}
