import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { BenchCase } from './cases.ts';

export interface Timing {
  /** of the fastest round */
  readonly seconds: number;
  /** ΣC at its end */
  readonly cover: number;
}

export interface Yardstick {
  time(bench: BenchCase): Timing;
  close(): void;
}

/** 128-bit vectors, as WebAssembly has them. */
const flags = ['-O3', '-ffast-math', '-msse4.1'];

/**
 * Compiles the step in C with the machine's own compiler.
 *
 * @returns the yardstick, or why there is none
 */
export function compileYardstick(): Yardstick | { readonly reason: string } {
  if (process.arch !== 'x64')
    return { reason: `the flags of the C yardstick are for x64, this is ${process.arch}` };
  if (spawnSync('cc', ['--version']).status !== 0) return { reason: 'there is no C compiler (cc)' };
  const folder = mkdtempSync(join(tmpdir(), 'foothold-bench-'));
  const program = join(folder, 'yardstick');
  const close = () => {
    rmSync(folder, { recursive: true, force: true });
  };
  const compiled = spawnSync(
    'cc',
    [...flags, '-o', program, join(import.meta.dirname, 'yardstick.c'), '-lm'],
    { encoding: 'utf8' },
  );
  if (compiled.status !== 0) {
    close();
    return { reason: `cc failed: ${compiled.stderr.trim()}` };
  }
  return {
    time(bench) {
      const file = join(folder, 'case.bin');
      writeFileSync(file, encodeCase(bench));
      const [seconds, cover] = execFileSync(program, [file], { encoding: 'utf8' })
        .trim()
        .split(' ')
        .map(Number);
      return { seconds, cover };
    },
    close,
  };
}

/** A case as yardstick.c reads it: its struct, the taps, the sites, then the arrays of cells. */
export function encodeCase({ setup, mode, steps, rounds, droughtIndex }: BenchCase): Uint8Array {
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
    setup.cover ?? new Float32Array(width * height),
    Uint16Array.from(setup.clumps ?? new Uint16Array(width * height)),
  ];
  return Buffer.concat(parts.map((p) => new Uint8Array(p.buffer, p.byteOffset, p.byteLength)));
}
