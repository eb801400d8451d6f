import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { clumpSites } from '#sim-core/kernel/clump-sites.ts';
import type { KernelSetup } from '#sim-core/kernel/kernel.ts';
import { defaultRates, type Rates } from '#sim-core/spec/parameters.ts';
import type { GrazerRates } from '#sim-core/spec/process-parameters.ts';
import { processesSchema } from '#sim-core/spec/processes.ts';
import { runSpecSchema, type RunSpec, type RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { discreteGaussian } from '#sim-core/theory/spread-kernel.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';

/** What a test may say about a kernel; the rest is plain: full ground, no exposure, no refuge, yearly steps. */
export type SetupInput = Partial<Omit<KernelSetup, 'step' | 'rates' | 'taps' | 'grazing'>> & {
  width: number;
  height: number;
  variance?: number;
  rates?: Partial<Rates>;
  stepsPerYear?: number;
  cellSize?: number;
  /** rates at their defaults but for those told; the variance is that of their spread, cells² */
  grazers?: { rates?: Partial<GrazerRates>; variance?: number; fence?: Uint8Array };
};

export function kernelSetup(input: SetupInput): KernelSetup {
  const { width, height, variance = 0.5, stepsPerYear = 1, cellSize = 2, grazers } = input;
  const rates = { ...defaultRates, ...input.rates };
  const cells = width * height;
  return {
    mode: 'mean-field',
    boundary: 'mirror',
    capacity: new Uint8Array(cells).fill(255),
    vigour: new Uint8Array(cells).fill(255),
    exposure: new Uint8Array(cells),
    refuge: new Uint8Array(cells),
    sites: clumpSites(rates.clumpsPerSquareMetre, cellSize),
    luck: { k0: 1, k1: 2 },
    replicate: 0,
    ...input,
    taps: discreteGaussian(variance),
    step: stepRates(rates, stepsPerYear),
    rates,
    grazing: grazers && {
      rates: processesSchema.parse({ grazers: grazers.rates ?? {} }).grazers!,
      taps: discreteGaussian(grazers.variance ?? 1),
      fence: grazers.fence ?? new Uint8Array(cells),
    },
  };
}

/** A grid of the given cells in an invented place. */
export const gridOf = (width: number, height: number, cellSize = 1): Grid => ({
  width,
  height,
  cellSize,
  originX: 500_000,
  originY: 4_000_000,
  epsg: 32617,
});

/** Full ground with what a test says about it. */
export function groundOf(cells: number, given: Partial<Ground> = {}): Ground {
  return {
    capacity: new Uint8Array(cells).fill(255),
    vigour: new Uint8Array(cells).fill(255),
    exposure: new Uint8Array(cells),
    refuge: new Uint8Array(cells),
    fence: new Uint8Array(cells),
    cover: new Float32Array(cells),
    ...given,
  };
}

export const specOf = (given: Partial<RunSpecInput>): RunSpec =>
  runSpecSchema.parse({
    version: 1,
    seed: 'test',
    surveyYear: 2020,
    years: 5,
    rates: {},
    layers: { cover: { file: 'cover.tif' } },
    ...given,
  });
