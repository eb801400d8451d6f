import { RunProblem } from '#sim-core/run/run-problem.ts';
import { grazerDecline, type Grazing } from '#sim-core/process/grazers.ts';
import type { StepRates } from '#sim-core/theory/step-rates.ts';
import { coverOfClumps, type CreateKernel, type KernelSetup, type StepLosses } from '../kernel.ts';
import { instantiateKernel, type KernelExports } from './kernel-module.ts';

/**
 * The kernel that ships: the step of the model four cells at a time, in single precision, in WebAssembly (`assembly/`).
 * It keeps the whole map in one memory, 8.1 bytes a cell in mean-field and 10.1 in counts (12.1 above 65,535 sites), 5
 * more where there are grazers, and a few rows.
 *
 * @throws RunProblem where the machine does not give that much memory
 */
export const createSimdKernel: CreateKernel = (setup) => {
  const { width, height, mode, boundary, taps, step, rates, sites, luck, skip = true, grazing } = setup;
  const counts = mode === 'counts';
  const wide = sites[255] > 65_535;
  const cells = width * height;
  const wasm = instantiateKernel();
  const laidOut =
    wasm.layOut(width, height, taps.length - 1, boundary === 'mirror', counts, wide) &&
    (!grazing || wasm.layOutGrazers(grazing.taps.length - 1));
  if (!laidOut)
    throw new RunProblem([
      {
        field: 'layers',
        message: `There is no memory for ${width} × ${height} cells: close other programs, or take larger cells`,
      },
    ]);
  const { buffer } = wasm.memory;
  const cover = new Float32Array(buffer, wasm.cover.value, cells);
  const clumps = !counts
    ? undefined
    : wide
      ? new Uint32Array(buffer, wasm.clumps.value, cells)
      : new Uint16Array(buffer, wasm.clumps.value, cells);
  layGround(wasm, setup);
  new Float32Array(buffer, wasm.taps.value, taps.length).set(taps);
  wasm.setSpread(step.carryOver, step.recruits, step.seedlings, rates.refugeGrowth, rates.crowding);
  wasm.setLoss(
    step.years,
    rates.backgroundLoss,
    rates.droughtLoss,
    rates.lossWidth,
    rates.tolerance,
    rates.exposureShift,
    rates.refugeShift,
    rates.neighbourShift,
  );
  wasm.setSkip(skip);
  if (clumps) {
    new Uint32Array(buffer, wasm.sites.value, 256).set(sites);
    wasm.setLuck(luck.k0, luck.k1, setup.replicate);
    if (setup.clumps) {
      const { capacity } = setup;
      clumps.set(setup.clumps);
      for (let i = 0; i < cells; i++) cover[i] = coverOfClumps(capacity[i], clumps[i], sites[capacity[i]]);
    }
  } else if (setup.cover) cover.set(setup.cover);
  wasm.look();
  const herd = grazing && setGrazers(wasm, grazing, step, cells);

  return {
    cover,
    clumps,
    refugeAt: (cell) => wasm.refugeAt(cell),
    setRefuge(cell, refuge) {
      wasm.setRefuge(cell, refuge);
    },
    grazers: herd?.grazers,
    fence: herd?.fence,
    changed() {
      wasm.look();
    },
    step(index: number, droughtIndex: number): StepLosses {
      wasm.step(index, droughtIndex, grazing ? grazerDecline(grazing.rates, step.years, droughtIndex) : 0);
      return {
        drought: wasm.lostToDrought.value,
        background: wasm.lostToBackground.value,
        grazing: wasm.lostToGrazing.value,
      };
    },
  };
};

/** The kernel holds the ground in an order of its own (`assembly/state.ts`). */
function layGround(wasm: KernelExports, setup: KernelSetup): void {
  const { width, height } = setup;
  const row = new Uint8Array(wasm.memory.buffer, wasm.groundRow.value, width);
  [setup.capacity, setup.vigour, setup.exposure, setup.refuge].forEach((cells, part) => {
    for (let y = 0; y < height; y++) {
      row.set(cells.subarray(y * width, (y + 1) * width));
      wasm.layGround(part, y);
    }
  });
}

function setGrazers(
  wasm: KernelExports,
  { rates, taps, fence }: Grazing,
  { years }: StepRates,
  cells: number,
) {
  const { buffer } = wasm.memory;
  wasm.setGrazers(
    rates.grazingRate,
    rates.grazerGrowth * years,
    rates.refugePredation * years,
    rates.grazerImmigration * years,
    rates.grazerLimit,
  );
  new Float32Array(buffer, wasm.grazerTaps.value, taps.length).set(taps);
  const grazers = new Float32Array(buffer, wasm.grazers.value, cells);
  grazers.fill(Math.min(rates.initialGrazers, rates.grazerLimit));
  const fences = new Uint8Array(buffer, wasm.fence.value, cells);
  fences.set(fence);
  return { grazers, fence: fences };
}
