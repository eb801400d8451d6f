import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { BenchCase } from './cases.ts';
import { writeCase } from './case-file.ts';

export interface Timing {
  /** of the processor, in the fastest round */
  readonly seconds: number;
  /** ΣC at its end */
  readonly cover: number;
}

/** The same step written otherwise, or why it cannot be timed here. */
export type Yardstick = { time(file: string): Timing } | { readonly reason: string };

/** Where cases and programs lie while the bench runs. */
export function benchFolder() {
  const folder = mkdtempSync(join(tmpdir(), 'foothold-bench-'));
  return {
    path: (name: string) => join(folder, name),
    write(bench: BenchCase): string {
      const file = join(folder, 'case.bin');
      writeCase(file, bench);
      return file;
    },
    close: () => {
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

const timing = (printed: string): Timing => {
  const [seconds, cover] = printed.trim().split(' ').map(Number);
  return { seconds, cover };
};

/**
 * Compiles the step in C with the machine's own compiler.
 *
 * @param width of its vectors: 128 bits, as WebAssembly has them, or the machine's own
 * @param program path of what is compiled
 */
export function compileYardstick(width: '128' | 'native', program: string): Yardstick {
  if (process.arch !== 'x64')
    return { reason: `the flags of the C yardstick are for x64, this is ${process.arch}` };
  if (spawnSync('cc', ['--version']).status !== 0) return { reason: 'there is no C compiler (cc)' };
  const flags = ['-O3', '-ffast-math', width === '128' ? '-msse4.1' : '-march=native'];
  const source = join(import.meta.dirname, 'yardstick.c');
  const compiled = spawnSync('cc', [...flags, '-o', program, source, '-lm'], { encoding: 'utf8' });
  if (compiled.status !== 0) return { reason: `cc failed: ${compiled.stderr.trim()}` };
  return { time: (file) => timing(execFileSync(program, [file], { encoding: 'utf8' })) };
}

/**
 * The step in NumPy and SciPy, as one would write it in a notebook.
 *
 * @param precision float64 is what NumPy takes unless told otherwise; float32 is half the memory to go through
 */
export function arrayScript(precision: 'float64' | 'float32'): Yardstick {
  const check = spawnSync('python3', ['-c', 'import numpy, scipy.ndimage'], { encoding: 'utf8' });
  if (check.status !== 0) return { reason: 'there is no python3 with NumPy and SciPy' };
  const script = join(import.meta.dirname, 'array-script.py');
  const env = { ...process.env, OMP_NUM_THREADS: '1', OPENBLAS_NUM_THREADS: '1' };
  return {
    time: (file) => timing(execFileSync('python3', [script, file, precision], { encoding: 'utf8', env })),
  };
}
