import { writeFileSync } from 'node:fs';
import type { BenchCase } from './cases.ts';

/**
 * Writes a case as the yardsticks read it: its struct, the taps, the sites, the arrays of cells, and what stands on them
 * (floats of cover in mean-field, 16-bit numbers of clumps in counts).
 */
export function writeCase(file: string, { setup, mode, steps, rounds, droughtIndex }: BenchCase): void {
  const { width, height, taps, step, rates, luck, sites, capacity, vigour, exposure, refuge } = setup;
  const parts: ArrayBufferView[] = [
    Int32Array.of(width, height, taps.length - 1, mode === 'counts' ? 1 : 0, steps, rounds),
    Uint32Array.of(luck.k0, luck.k1),
    Float32Array.of(
      step.carryOver,
      step.recruits,
      step.years,
      rates.backgroundLoss,
      rates.droughtLoss,
      rates.lossWidth,
      rates.tolerance,
      rates.exposureShift,
      rates.refugeShift,
      rates.neighbourShift,
      rates.refugeGrowth,
      droughtIndex,
    ),
    Float32Array.from(taps),
    sites,
    capacity,
    vigour,
    exposure,
    refuge,
    setup.clumps ? Uint16Array.from(setup.clumps) : (setup.cover ?? new Float32Array(width * height)),
  ];
  writeFileSync(file, '');
  for (const p of parts)
    writeFileSync(file, new Uint8Array(p.buffer, p.byteOffset, p.byteLength), { flag: 'a' });
}
