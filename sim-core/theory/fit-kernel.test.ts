import { describe, expect, test } from 'vitest';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import { fitKernel, frontSpeed } from './fit-kernel.ts';

const rates = { lateralSpread: 0.5, fillRate: 1, carryOver: 0.7 };

function problemOf(of: () => unknown): string {
  try {
    of();
  } catch (error) {
    if (error instanceof RunProblem) return error.message;
    throw error;
  }
  return 'no problem';
}

describe('the kernel fit', () => {
  test.each([
    [0.5, 1, 1],
    [0.5, 0.25, 1],
    [0.5, 1, 12],
    [2, 1, 4],
    [0.1, 0.5, 2],
  ] as const)('gives a front of %f m/yr on cells of %f m, %i steps a year', (lateralSpread, cell, steps) => {
    const fitted = fitKernel({ ...rates, lateralSpread }, cell, steps);
    const speed = frontSpeed(rates, cell, steps, fitted.variance);
    expect(speed / lateralSpread).toBeCloseTo(1, 9);
    // What the cut at 1e−6 takes off.
    expect(fitted.frontSpeed).toBeLessThan(lateralSpread);
    expect(fitted.frontSpeed).toBeGreaterThan(0.975 * lateralSpread);
    expect(fitted.diagonalFrontSpeed).toBeLessThan(fitted.frontSpeed);
    expect(fitted.taps).toHaveLength(fitted.radius + 1);
  });

  test('with σ = 0 and a wide kernel the speed is 2√(rD), D = tΔx²/(2Δt): Fisher 1937', () => {
    for (const [r, cell, steps] of [
      [0.2, 0.05, 1],
      [1, 0.05, 1],
      [1, 0.1, 4],
    ] as const) {
      const { variance } = fitKernel({ lateralSpread: 1, fillRate: r, carryOver: 0 }, cell, steps);
      const diffusion = (variance * cell * cell * steps) / 2;
      expect(variance).toBeGreaterThan(4);
      // The lattice is felt at order θ² = 2r Δt/t: a correction of about θ²/24 of the speed.
      const theta2 = (2 * r) / (steps * variance);
      expect(Math.abs(2 * Math.sqrt(r * diffusion) - 1)).toBeLessThan(theta2 / 12);
    }
  });

  test('says that a cell is coarse, and the cell size that it names mends it', () => {
    const [warning] = fitKernel(rates, 1, 1).warnings;
    expect(warning).toMatch(/A cell of 1 m is coarse .* 89 % .* Cells of 0\.5 m or less/);
    const mended = fitKernel(rates, 0.5, 1);
    expect(mended.warnings).toEqual([]);
    expect(mended.diagonalFrontSpeed / mended.frontSpeed).toBeGreaterThan(0.95);
    expect(fitKernel(rates, 0.52, 1).warnings).toHaveLength(1);
  });

  test('names other steps where they mend it', () => {
    const [warning] = fitKernel(rates, 0.52, 1).warnings;
    expect(warning).toMatch(/, and so would 2 steps a year\.$/);
    expect(fitKernel(rates, 0.52, 2).warnings).toEqual([]);
    expect(fitKernel(rates, 1, 1).warnings[0]).not.toMatch(/so would/);
  });

  test('refuses a front too slow for its cells, with a cell size and a speed that would do', () => {
    const said = problemOf(() => fitKernel({ ...rates, lateralSpread: 0.05 }, 10, 1));
    expect(said).toMatch(/^rates\.lateralSpread: A front of 0\.05 m\/yr cannot be shown on cells of 10 m/);
    const [, cell, speed] = /cells of ([\d.]+) m or less, or a lateral spread of ([\d.]+)/.exec(said) ?? [];
    expect(fitKernel({ ...rates, lateralSpread: 0.05 }, Number(cell), 1).radius).toBeGreaterThan(0);
    expect(fitKernel({ ...rates, lateralSpread: Number(speed) }, 10, 1).radius).toBeGreaterThan(0);
  });

  test('refuses a front too fast for its cells, with a cell size and a speed that would do', () => {
    const said = problemOf(() => fitKernel({ ...rates, lateralSpread: 20 }, 0.05, 1));
    expect(said).toMatch(
      /^rates\.lateralSpread: A front of 20 m\/yr on cells of 0\.05 m .* wider than 256 cells/,
    );
    const [, cell, speed] = /cells of ([\d.]+) m or more, or a lateral spread of ([\d.]+)/.exec(said) ?? [];
    expect(fitKernel({ ...rates, lateralSpread: 20 }, Number(cell), 1).radius).toBeLessThanOrEqual(256);
    expect(fitKernel({ ...rates, lateralSpread: Number(speed) }, 0.05, 1).radius).toBeLessThanOrEqual(256);
  });

  test('refuses rates without growth or spread, each at its field', () => {
    const said = problemOf(() => fitKernel({ ...rates, lateralSpread: 0, fillRate: 0 }, 1, 1));
    expect(said).toMatch(/rates\.lateralSpread: Found 0.*\nrates\.fillRate: Found 0/);
  });
});
