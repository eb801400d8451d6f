import { describe, expect, test } from 'vitest';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { fitKernel } from '#sim-core/theory/fit-kernel.ts';
import { referenceShare } from '#sim-core/theory/reference-cover.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';
import { kernelSetup } from './setups.ts';

/** Whole waves of a kernel, against an exact one, and against themselves on finer steps and cells. */
export function describeWaveShapes(name: string, createKernel: CreateKernel): void {
  describe(`${name}: waves`, () => {
    /**
     * Where all clumps are re-issued each step (σ = 0) and growth in a step is small, cover in units of what settles
     * obeys u_t = D u_xx + r u(1 − u), with errors in the order of r a step. Its exact wave is u = (1 + e^(z/√6))⁻², with
     * z = x√(r/D) − (5/√6) r t (Ablowitz & Zeppetella 1979, Bull. Math. Biol. 41:835–840).
     */
    const exact = (z: number) => (1 + Math.exp(z / Math.sqrt(6))) ** -2;
    test.each([
      [-10, 0.967103470079948],
      [-1, 0.360801778902356],
      [0, 0.25],
      [5, 0.0132112909195671],
    ])('the exact wave at z = %f is %f', (z, u) => {
      expect(exact(z)).toBeCloseTo(u, 12);
    });

    test('the exact wave keeps its shape and moves at 5/√6 √(rD), ever closer as the step is refined', () => {
      /** Largest error of u after rt = 4, with r = `growth` a step. */
      const worst = (growth: number) => {
        const variance = 40 * growth;
        // √(D/r), cells: the same for every step.
        const scale = Math.sqrt(variance / 2 / growth);
        const rates = { ...defaultRates, fillRate: growth, carryOver: 0, droughtLoss: 0 };
        const settled = referenceShare(stepRates(rates, 1), 1);
        const steps = Math.round(4 / growth);
        const [behind, width] = [Math.ceil(25 * scale), Math.ceil(75 * scale)];
        const cover = Float32Array.from({ length: width }, (_, x) => settled * exact((x - behind) / scale));
        const kernel = createKernel(kernelSetup({ width, height: 1, cover, variance, rates }));
        for (let step = 0; step < steps; step++) kernel.step(step, 0);
        let error = 0;
        for (let x = behind; x < behind + 30 * scale; x++) {
          const z = (x - behind) / scale - (5 / Math.sqrt(6)) * growth * steps;
          error = Math.max(error, Math.abs(kernel.cover[x] / settled - exact(z)));
        }
        return error;
      };
      const errors = [0.08, 0.04, 0.02].map(worst);
      expect(errors[2]).toBeLessThan(0.02);
      // First order: half the step, half the error.
      for (let i = 1; i < errors.length; i++) {
        expect(errors[i - 1] / errors[i]).toBeGreaterThan(1.7);
        expect(errors[i - 1] / errors[i]).toBeLessThan(2.3);
      }
    });

    test('finer cells or steps come to the same front', () => {
      /** Metres that a front of 0.8 m/yr moves from year 20 to year 50. */
      const advance = (cellSize: number, stepsPerYear: 1 | 2 | 4 | 12) => {
        const rates = { ...defaultRates, lateralSpread: 0.8, droughtLoss: 0 };
        const width = Math.ceil(70 / cellSize);
        const kernel = createKernel(
          kernelSetup({
            width,
            height: 1,
            cellSize,
            stepsPerYear,
            variance: fitKernel(rates, cellSize, stepsPerYear).variance,
            cover: new Float32Array(width).fill(1, 0, Math.round(10 / cellSize)),
            rates,
          }),
        );
        const place = () => (kernel.cover.reduce((sum, c) => sum + c, 0) / kernel.cover[0]) * cellSize;
        let first = 0;
        for (let step = 0; step < 50 * stepsPerYear; step++) {
          if (step === 20 * stepsPerYear) first = place();
          kernel.step(step, 0);
        }
        return place() - first;
      };
      // Speeds agree by the fit; what is left is the lag of a young front, which differs little (Bramson 1983).
      const fine = advance(0.25, 12);
      expect(fine).toBeGreaterThan(0.93 * 24);
      expect(fine).toBeLessThan(24);
      for (const [cellSize, stepsPerYear] of [
        [1, 1],
        [0.5, 2],
        [0.5, 4],
        [0.25, 1],
      ] as const)
        expect(Math.abs(advance(cellSize, stepsPerYear) / fine - 1)).toBeLessThan(0.03);
    });
  });
}
