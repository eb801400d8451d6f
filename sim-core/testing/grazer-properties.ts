import { describe, expect, test } from 'vitest';
import type { CreateKernel, Kernel } from '#sim-core/kernel/kernel.ts';
import { grazerParameters } from '#sim-core/spec/process-parameters.ts';
import type { GrazerRates } from '#sim-core/spec/process-parameters.ts';
import { kernelSetup, type SetupInput } from './setups.ts';

const still: Partial<GrazerRates> = {
  grazerGrowth: 0,
  grazerMortality: 0,
  predation: 0,
  refugePredation: 0,
  grazerImmigration: 0,
};
const sumOf = (values: ArrayLike<number>) => Array.from(values).reduce((sum, v) => sum + v, 0);

/** What grazers do on every kernel, in whole runs of steps; that one step is right is shown in `step-by-hand.ts`. */
export function describeGrazerProperties(name: string, createKernel: CreateKernel): void {
  const run = (input: SetupInput, droughtIndex: number, steps: number, start?: (kernel: Kernel) => void) => {
    const kernel = createKernel(kernelSetup(input));
    start?.(kernel);
    const losses = Array.from({ length: steps }, (_, i) => kernel.step(i, droughtIndex));
    return { cover: kernel.cover, grazers: kernel.grazers!, lost: sumOf(losses.map((l) => l.grazing)) };
  };
  const full = (width: number, height: number): Float32Array => new Float32Array(width * height).fill(1);

  describe(`${name}: grazers`, () => {
    test.each(['mean-field', 'counts'] as const)(
      'inside a whole fence they eat nothing, to the bit (%s)',
      (mode) => {
        const plants: SetupInput = {
          ...{ width: 30, height: 9, mode },
          cover: full(30, 9).map((_, i) => (i % 3) / 2),
          clumps: Uint32Array.from({ length: 270 }, (_, i) => (i % 3) * 8),
          rates: { backgroundLoss: 0.1 },
        };
        const grazers = { rates: { initialGrazers: 200, grazingRate: 0.1 } };
        const without = run(plants, -3, 3);
        const fenced = run(
          { ...plants, grazers: { ...grazers, fence: new Uint8Array(270).fill(255) } },
          -3,
          3,
        );
        expect(fenced.cover).toEqual(without.cover);
        expect(fenced.lost).toBe(0);
        const open = run({ ...plants, grazers }, -3, 3);
        expect(open.lost).toBeGreaterThan(10);
        expect(sumOf(open.cover)).toBeLessThan(0.7 * sumOf(without.cover));
      },
    );

    test('they only move where nothing adds or takes any: none is lost but over a bare edge', () => {
      const moved = (boundary: 'mirror' | 'bare') =>
        run(
          { width: 23, height: 11, boundary, grazers: { rates: still, variance: 4 } },
          0,
          5,
          ({ grazers }) => {
            grazers!.fill(0);
            grazers![2 * 23 + 3] = 100;
          },
        ).grazers;
      const kept = moved('mirror');
      expect(sumOf(kept)).toBeCloseTo(100, 3);
      expect(Math.max(...kept)).toBeLessThan(10);
      expect(sumOf(moved('bare'))).toBeLessThan(80);
    });

    test('those that do not spread stay where they are', () => {
      const rates = { ...still, initialGrazers: 3 };
      const { grazers } = run({ width: 7, height: 5, grazers: { rates, variance: 1e-9 } }, 0, 4, (kernel) => {
        kernel.grazers![17] = 9;
      });
      expect([...grazers]).toEqual(Array.from({ length: 35 }, (_, i) => (i === 17 ? 9 : 3)));
    });

    test('without plants as many stay as come in: ι Δt / (1 − e^(−Δt (m + p)))', () => {
      const input: SetupInput = { width: 9, height: 9, stepsPerYear: 4, grazers: {} };
      const { grazerMortality: m, predation: p, grazerImmigration: arrivals } = grazerParameters;
      const stay = arrivals.default / 4 / (1 - Math.exp(-(m.default + p.default) / 4));
      for (const g of run(input, 0, 80).grazers) expect(g).toBeCloseTo(stay, 5);
    });

    test('predators keep them down but in drought, and near refuges always', () => {
      const refuge = Uint8Array.from({ length: 900 }, (_, i) => (i % 30 >= 24 ? 255 : 0));
      const rates = { droughtLoss: 0 };
      const grazers = { rates: { initialGrazers: 1, predation: 8, refugePredation: 4 }, variance: 0.5 };
      const after = (droughtIndex: number) =>
        run({ width: 30, height: 30, cover: full(30, 30), refuge, rates, grazers }, droughtIndex, 8);
      const wet = after(0);
      const dry = after(-4);
      expect(Math.max(...wet.grazers)).toBeLessThan(2);
      expect(wet.lost / 900).toBeLessThan(0.1);
      const open = dry.grazers[15 * 30 + 8];
      expect(open).toBeGreaterThan(20 * Math.max(...wet.grazers));
      expect(dry.grazers[15 * 30 + 29]).toBeLessThan(open / 10);
      expect(dry.lost).toBeGreaterThan(4 * wet.lost);
      expect(dry.cover[15 * 30 + 29]).toBeGreaterThan(2 * dry.cover[15 * 30 + 8]);
    });

    test('in drought a front of them forms at the edge of what is left, and moves on', () => {
      const [width, height] = [90, 3];
      const at = (steps: number) => {
        const { cover, grazers } = run(
          {
            ...{ width, height, cover: full(width, height) },
            // Plants that cannot regrow, so that what is seen is the grazers' work.
            rates: { droughtLoss: 0, fillRate: 0.01, carryOver: 1 },
            grazers: {
              rates: {
                initialGrazers: 0,
                grazerImmigration: 0,
                grazingRate: 0.03,
                grazerGrowth: 3,
                grazerMortality: 1.5,
              },
              variance: 1,
            },
          },
          -5,
          steps,
          ({ grazers: G }) => {
            for (let y = 0; y < height; y++) G!.fill(50, y * width, y * width + 4);
          },
        );
        const row = <T extends Float32Array>(values: T) => Array.from(values.subarray(width, 2 * width));
        const [C, front] = [row(cover), row(grazers)];
        return { edge: C.findIndex((c) => c > 0.5), peak: front.indexOf(Math.max(...front)), C, front };
      };
      const early = at(12);
      const late = at(24);
      for (const { edge, peak, C, front } of [early, late]) {
        expect(Math.abs(peak - edge)).toBeLessThanOrEqual(4);
        // Eaten behind, untouched far ahead, and the many are at the edge.
        expect(C[0]).toBeLessThan(0.05);
        expect(C[80]).toBeGreaterThan(0.95);
        expect(front[0]).toBeLessThan(0.2 * front[peak]);
        expect(front[peak + 12]).toBeLessThan(0.2 * front[peak]);
      }
      expect(late.edge - early.edge).toBeGreaterThan(10);
    });

    test('every rate that a step reads changes it', () => {
      const grown = (rates: Partial<GrazerRates>) => {
        const cover = full(6, 6).map((_, i) => (i % 3) / 3);
        const refuge = Uint8Array.from(cover, (_, i) => i * 7);
        const { cover: C, grazers } = run({ width: 6, height: 6, cover, refuge, grazers: { rates } }, -2, 2);
        return `${C.join()} ${grazers.join()}`;
      };
      const base = grown({});
      for (const [rate, { min, max }] of Object.entries(grazerParameters)) {
        // Spread comes to the kernel as taps; the limit bites only when it is low.
        if (rate === 'grazerSpread') continue;
        const other = rate === 'grazerLimit' ? 4 : (min + max) / 2.03;
        expect(grown({ [rate]: other }), rate).not.toBe(base);
      }
    });
  });
}
