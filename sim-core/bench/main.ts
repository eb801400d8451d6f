import { performance } from 'node:perf_hooks';
import { createReferenceKernel } from '#sim-core/kernel/reference/reference-kernel.ts';
import { benchCase, type BenchCase } from './cases.ts';
import { compileYardstick, type Timing } from './yardstick.ts';

/**
 * `npm run bench [-- --json]`: how fast a step is, beside the same step in C in the same run. With --json a JSON object a
 * line; `ratio` above 1 means that we are faster.
 */
interface Line {
  readonly name: 'kernel';
  readonly mode: string;
  readonly map: string;
  readonly size: number;
  readonly against: string;
  /** cells × steps */
  readonly work: number;
  readonly seconds: number;
  /** cells a second */
  readonly rate: number;
  /** null where there is nothing to hold it against, and `reason` says why */
  readonly ratio: number | null;
  readonly reason?: string;
}

function timeKernel({ setup, steps, rounds, droughtIndex }: BenchCase): Timing {
  let seconds = Infinity;
  let cover = 0;
  for (let round = 0; round < rounds; round++) {
    const kernel = createReferenceKernel(setup);
    const start = performance.now();
    for (let step = 0; step < steps; step++) kernel.step(step, droughtIndex);
    seconds = Math.min(seconds, (performance.now() - start) / 1000);
    cover = kernel.cover.reduce((sum, c) => sum + c, 0);
  }
  return { seconds, cover };
}

/** Both must have done the same work: single against double precision leaves a thousandth at most. */
function refuseOtherWork(bench: BenchCase, ours: Timing, theirs: Timing): void {
  if (Math.abs(ours.cover / theirs.cover - 1) > 1e-3)
    throw new Error(
      `${bench.mode}, ${bench.map}, ${bench.size}: the kernel ends with ΣC = ${ours.cover}, the yardstick with ${theirs.cover}`,
    );
}

const json = process.argv.includes('--json');
const yardstick = compileYardstick();
if (!json)
  console.log(
    `${'mode'.padEnd(11)} ${'map'.padEnd(7)} ${'size'.padStart(5)} ${'million cells/s'.padStart(16)} ${'against c-128'.padStart(14)}`,
  );
for (const size of [500, 2000])
  for (const map of ['full', 'sparse'] as const)
    for (const mode of ['mean-field', 'counts'] as const) {
      const bench = benchCase(mode, map, size);
      const ours = timeKernel(bench);
      const work = size * size * bench.steps;
      const theirs = 'reason' in yardstick ? undefined : yardstick.time(bench);
      if (theirs) refuseOtherWork(bench, ours, theirs);
      const line: Line = {
        name: 'kernel',
        mode,
        map,
        size,
        against: 'c-128',
        work,
        seconds: ours.seconds,
        rate: work / ours.seconds,
        ratio: theirs ? theirs.seconds / ours.seconds : null,
        ...('reason' in yardstick && { reason: yardstick.reason }),
      };
      if (json) console.log(JSON.stringify(line));
      else
        console.log(
          `${mode.padEnd(11)} ${map.padEnd(7)} ${String(size).padStart(5)} ${(line.rate / 1e6).toFixed(1).padStart(16)} ${
            line.ratio?.toFixed(2).padStart(14) ?? `skipped: ${line.reason}`
          }`,
        );
    }
if (!('reason' in yardstick)) yardstick.close();
