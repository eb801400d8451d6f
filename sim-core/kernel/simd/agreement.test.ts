import { describe, expect, test } from 'vitest';
import { clumpSites } from '#sim-core/kernel/clump-sites.ts';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { createReferenceKernel } from '#sim-core/kernel/reference/reference-kernel.ts';
import { binomialQuantile } from '#sim-core/random/binomial.ts';
import { stream } from '#sim-core/random/streams.ts';
import { kernelSetup, type SetupInput } from '#sim-core/testing/setups.ts';
import { createSimdKernel } from './simd-kernel.ts';

/**
 * The shipping kernel computes in single precision: its q and S are within 4 × 2^−24 of the reference's, and so is C
 * after one step. What it may be off after more steps grows with the growth of C: at most by e^(r) a step.
 */
const afterOneStep = 4 * 2 ** -24;

/** A map wide enough for runs, stretches and cut groups, with ground of all kinds; the middle is bare. */
function varied(width: number, height: number, given: Partial<SetupInput> = {}): SetupInput {
  const random = stream('varied', 'parameters');
  const cells = width * height;
  const bytes = (low: number) =>
    Uint8Array.from({ length: cells }, () => low + Math.floor((256 - low) * random.quick()));
  const capacity = bytes(60).map((k, i) => (i % 13 === 0 ? 0 : k));
  const lives = (i: number) => i % width < 30 || i % width > width - 20;
  return {
    width,
    height,
    capacity,
    vigour: bytes(100),
    exposure: bytes(0),
    refuge: bytes(0),
    cover: Float32Array.from(capacity, (k, i) => (lives(i) ? (random.quick() * k) / 255 : 0)),
    clumps: Uint32Array.from(capacity, (k, i) => (lives(i) && k > 0 ? Math.floor(random.quick() * 4) : 0)),
    rates: { backgroundLoss: 0.05, crowding: 0.5 },
    ...given,
  };
}

const after = (createKernel: CreateKernel, input: SetupInput, droughtIndices: number[]) => {
  const kernel = createKernel(kernelSetup(input));
  const losses = droughtIndices.map((x, i) => kernel.step(i, x));
  return { kernel, losses };
};

describe('the shipping kernel agrees with the reference', () => {
  test.each([
    ['mirror', 0.4, 0],
    ['bare', 2.5, 0],
    ['mirror', 0.4, 0.01],
    ['bare', 60, 0],
  ] as const)(
    'mean-field, one step: %s boundary, t = %d, seedlings %d',
    (boundary, variance, seedlingRate) => {
      for (const droughtIndex of [1, -2.2, -4]) {
        const input = varied(301, 40, { boundary, variance });
        input.rates = { ...input.rates, seedlingRate };
        const ours = after(createSimdKernel, input, [droughtIndex]);
        const theirs = after(createReferenceKernel, input, [droughtIndex]);
        let worst = 0;
        theirs.kernel.cover.forEach((c, i) => {
          worst = Math.max(worst, Math.abs(ours.kernel.cover[i] - c));
        });
        expect(worst).toBeLessThan(afterOneStep);
        for (const cause of ['drought', 'background'] as const)
          expect(Math.abs(ours.losses[0][cause] / theirs.losses[0][cause] - 1)).toBeLessThan(1e-5);
      }
    },
  );

  test.each([
    ['mirror', 3, 'mean-field', 0.05],
    ['bare', 40, 'mean-field', 0],
    ['mirror', 9, 'counts', 0],
  ] as const)(
    'with grazers, over 6 steps: %s boundary, variance of their spread %d, %s, background loss %d',
    (boundary, variance, mode, backgroundLoss) => {
      const input = varied(301, 40, { boundary, mode });
      const fence = Uint8Array.from({ length: 301 * 40 }, (_, i) => (i % 7) * 40);
      const rates = { initialGrazers: 60, grazerLimit: 90, grazingRate: 0.02, grazerGrowth: 5, predation: 1 };
      const years = mode === 'counts' ? [-3] : [1, -1, 0, -1.5, 2, -2.5];
      input.rates = { ...input.rates, backgroundLoss };
      const grazed = { ...input, grazers: { rates, variance, fence } };
      const ours = after(createSimdKernel, grazed, years);
      const theirs = after(createReferenceKernel, grazed, years);
      let worst = 0;
      let highest = 0;
      theirs.kernel.grazers!.forEach((g, i) => {
        worst = Math.max(worst, Math.abs(ours.kernel.grazers![i] / g - 1));
        highest = Math.max(highest, g);
      });
      // Single precision, growing with e^(f Δt φ₁): a few units in the seventh digit a step.
      expect(worst).toBeLessThan(2e-5);
      expect(highest).toBe(90);
      let different = 0;
      theirs.kernel.cover.forEach((c, i) => {
        if (mode === 'counts' ? ours.kernel.cover[i] !== c : Math.abs(ours.kernel.cover[i] - c) > 1e-5)
          different++;
      });
      expect(different).toBeLessThanOrEqual(mode === 'counts' ? 1 : 0);
      years.forEach((_, i) => {
        for (const cause of ['drought', 'background', 'grazing'] as const)
          expect(Math.abs(ours.losses[i][cause] - theirs.losses[i][cause])).toBeLessThanOrEqual(
            1e-4 * theirs.losses[i][cause],
          );
      });
    },
  );

  test('mean-field, 20 steps: within 2e−5 where C is 0 to 1', () => {
    const input = varied(120, 30);
    const years = Array.from({ length: 20 }, (_, i) => Math.sin(i) * 2 - 1);
    const ours = after(createSimdKernel, input, years).kernel.cover;
    const theirs = after(createReferenceKernel, input, years).kernel.cover;
    theirs.forEach((c, i) => expect(Math.abs(ours[i] - c)).toBeLessThan(2e-5));
    expect(theirs.reduce((sum, c) => sum + c, 0)).toBeGreaterThan(100);
  });

  test.each([
    ['few sites', 4, 2],
    ['many sites', 20, 2],
    ['very many sites, in 32 bits', 900, 10],
  ])('counts, cell by cell but where u lies in the rounding of a chance: %s', (_, sitesPerArea, cellSize) => {
    const input = varied(301, 60, { mode: 'counts', cellSize });
    input.rates = { ...input.rates, clumpsPerSquareMetre: sitesPerArea };
    const sites = clumpSites(sitesPerArea, cellSize);
    const share = stream('stands', 'parameters');
    const clumps = input.clumps!.map((n, i) =>
      n > 0 ? Math.ceil(share.quick() * sites[input.capacity![i]]) : 0,
    );
    const ours = after(createSimdKernel, { ...input, clumps }, [-1.5]).kernel;
    const theirs = after(createReferenceKernel, { ...input, clumps }, [-1.5]).kernel;
    let different = 0;
    theirs.clumps!.forEach((n, i) => {
      if (ours.clumps![i] === n) return;
      different++;
      expect(Math.abs(ours.clumps![i] - n)).toBe(1);
    });
    // A chance is off by 1e−7, a cumulative probability by √n times that: 18,060 cells with two draws meet it seldom.
    expect(different).toBeLessThanOrEqual(sites[255] > 1000 ? 20 : 1);
    let standing = 0;
    theirs.clumps!.forEach((n) => (standing += n));
    expect(standing).toBeGreaterThan(1000 * sitesPerArea);
  });
});

describe('skipping on a map of many stretches', () => {
  test.each([
    ['mean-field', 0],
    ['mean-field', 0.01],
    ['counts', 0],
    ['counts', 0.01],
  ] as const)('changes no bit: %s, seedlings %d', (mode, seedlingRate) => {
    const input = varied(601, 25, { mode, variance: 0.3 });
    input.rates = { ...input.rates, seedlingRate };
    const barren = (i: number) => i % 601 > 200 && i % 601 < 280;
    const ground = { ...input, capacity: input.capacity!.map((k, i) => (barren(i) ? 0 : k)) };
    const years = [0, -3, 1, 0, 0];
    for (const grazers of [undefined, { rates: { initialGrazers: 40 }, variance: 2 }]) {
      const skipping = after(createSimdKernel, { ...ground, grazers }, years);
      const plodding = after(createSimdKernel, { ...ground, grazers, skip: false }, years);
      expect(skipping.kernel.cover).toEqual(plodding.kernel.cover);
      expect(skipping.kernel.grazers).toEqual(plodding.kernel.grazers);
      expect(skipping.losses).toEqual(plodding.losses);
    }
    const skipping = after(createSimdKernel, ground, years);
    const bare = skipping.kernel.cover.reduce((sum, c) => sum + (c === 0 ? 1 : 0), 0);
    expect(bare).toBeGreaterThan(1000);
  });

  test('what others planted or took is heard of', () => {
    // Higher than the kernel reaches, so that rows at its very end are heard or not.
    const cover = new Float32Array(200 * 49);
    const grown = [true, false].map((skip) => {
      const kernel = createSimdKernel(kernelSetup({ width: 200, height: 49, cover, skip }));
      kernel.step(0, 0);
      kernel.cover[24 * 200 + 150] = 0.5;
      kernel.changed();
      kernel.step(1, 0);
      return kernel.cover.slice();
    });
    expect(grown[0]).toEqual(grown[1]);
    expect(grown[0].filter((c) => c > 0).length).toBeGreaterThan(20);
  });
});

test.each([
  [37, 10],
  [64, 3],
  [1, 9],
])('refuge that is set later is as if it had been there, cell by cell: %d × %d', (width, height) => {
  const cells = width * height;
  const refuge = Uint8Array.from({ length: cells }, (_, i) => (i * 89) % 256);
  const input: SetupInput = {
    width,
    height,
    cover: new Float32Array(cells).fill(0.3),
    grazers: { rates: { initialGrazers: 40, refugePredation: 1 }, variance: 2 },
  };
  const there = createSimdKernel(kernelSetup({ ...input, refuge }));
  const later = createSimdKernel(kernelSetup({ ...input, refuge: new Uint8Array(cells).fill(7) }));
  refuge.forEach((byte, cell) => {
    later.setRefuge(cell, byte);
  });
  later.changed();
  expect(Array.from(refuge, (_, cell) => later.refugeAt(cell))).toEqual([...refuge]);
  const losses = [there, later].map((kernel) => kernel.step(0, -2));
  expect(later.cover).toEqual(there.cover);
  expect(later.grazers).toEqual(there.grazers);
  expect(losses[1]).toEqual(losses[0]);
  expect(new Set(later.cover).size).toBeGreaterThan(Math.min(cells, 256) / 2);
});

test('a map of one cell, and one narrower than its kernel, are stepped too', () => {
  for (const [width, height] of [
    [1, 1],
    [3, 2],
    [2, 300],
  ]) {
    const input: SetupInput = {
      width,
      height,
      variance: 40,
      cover: new Float32Array(width * height).fill(0.25),
    };
    const ours = after(createSimdKernel, input, [0]).kernel.cover;
    const theirs = after(createReferenceKernel, input, [0]).kernel.cover;
    theirs.forEach((c, i) => expect(Math.abs(ours[i] - c)).toBeLessThan(afterOneStep));
  }
});

test('the binomial quantile meets its reference up to the most sites', () => {
  const random = stream('many', 'parameters');
  const input = { width: 40, height: 40, mode: 'counts' as const, cellSize: 10 };
  const sites = new Uint32Array(256).fill(100_000);
  const clumps = Uint32Array.from({ length: 1600 }, () => Math.floor(random.quick() * 100_000));
  const setup = kernelSetup({ ...input, sites, clumps });
  const ours = createSimdKernel(setup);
  const theirs = createReferenceKernel(setup);
  ours.step(0, -2);
  theirs.step(0, -2);
  let off = 0;
  theirs.clumps!.forEach((n, i) => {
    off = Math.max(off, Math.abs(ours.clumps![i] - n));
  });
  // 1e−7 of 100,000 sites
  expect(off).toBeLessThanOrEqual(1);
  expect(binomialQuantile(0.5, 100_000, 0.5)).toBe(50_000);
});
