import type { Mode } from '#sim-core/spec/run-spec.ts';
import { createSimdKernel } from '#sim-core/kernel/simd/simd-kernel.ts';
import { benchCase, type BenchCase } from './cases.ts';
import { printLine } from './line.ts';
import { arrayScript, benchFolder, compileYardstick, type Timing } from './yardstick.ts';

/**
 * How fast a step is, beside the same step in C and in NumPy in the same run (`npm run bench`). Times are those of the
 * processor, which other work on the machine disturbs least; ours and theirs take turns.
 */
const sizes = [500, 2000, 4000];
const modes = ['mean-field', 'counts'] as const;
/** The array script takes some 100 bytes a cell and as many times longer: this size shows enough. */
const scriptSize = 2000;
/** Bytes a cell of ground (five layers of 8 bits and surveyed cover of 32) and closing years, which a run holds too. */
const besideKernel = 5 + 4 + 2;

/** Like the yardsticks: one map, put back to its start before each round. */
function timeKernel({ setup, steps, rounds, droughtIndex }: BenchCase): Timing & { bytes: number } {
  const kernel = createSimdKernel(setup);
  const cover = kernel.cover.slice();
  const clumps = kernel.clumps?.slice();
  let seconds = Infinity;
  for (let round = 0; round < rounds; round++) {
    kernel.cover.set(cover);
    if (clumps) kernel.clumps!.set(clumps);
    kernel.changed();
    const start = process.cpuUsage();
    for (let step = 0; step < steps; step++) kernel.step(step, droughtIndex);
    const { user, system } = process.cpuUsage(start);
    seconds = Math.min(seconds, (user + system) / 1e6);
  }
  const sum = kernel.cover.reduce((total, c) => total + c, 0);
  return { seconds, cover: sum, bytes: kernel.cover.buffer.byteLength };
}

/** Both must have done the same work: single against double precision, or other draws, leave a thousandth at most. */
function refuseOtherWork(bench: BenchCase, ours: Timing, theirs: Timing, against: string): void {
  if (Math.abs(ours.cover / theirs.cover - 1) > (against.startsWith('scipy') ? 1e-2 : 1e-3))
    throw new Error(
      `${bench.mode}, ${bench.map}, ${bench.size}: the kernel ends with ΣC = ${ours.cover}, ${against} with ${theirs.cover}`,
    );
}

const folder = benchFolder();
const yardsticks = [
  ['c-128', compileYardstick('128', folder.path('yardstick-128'))],
  ['c-native', compileYardstick('native', folder.path('yardstick-native'))],
  ['scipy', arrayScript('float64')],
  ['scipy-tuned', arrayScript('float32')],
] as const;
/** Seconds of our fastest round a cell and step, by mode, map and size. */
const costs = new Map<string, number>();
const costOf = (mode: Mode, map: string, size: number) => costs.get(`${mode} ${map} ${size}`)!;

// Until the engine has compiled the kernel in earnest.
for (const mode of modes) timeKernel({ ...benchCase(mode, 'full', 500), rounds: 80 });

for (const size of sizes)
  for (const map of ['full', 'sparse'] as const)
    for (const mode of modes) {
      const bench = benchCase(mode, map, size);
      const work = size * size * bench.steps;
      let ours = timeKernel(bench);
      const turns = size > 2000 ? 2 : 3;
      const file = folder.write(bench);
      const theirs = new Map<string, Timing>();
      for (let turn = 0; turn < turns; turn++) {
        for (const [against, yardstick] of yardsticks) {
          if ('reason' in yardstick) continue;
          if (against.startsWith('scipy') && (size !== scriptSize || map !== 'full' || turn > 0)) continue;
          const timed = yardstick.time(file);
          refuseOtherWork(bench, ours, timed, against);
          if (timed.seconds < (theirs.get(against)?.seconds ?? Infinity)) theirs.set(against, timed);
        }
        const again = timeKernel(bench);
        if (again.seconds < ours.seconds) ours = again;
      }
      costs.set(`${mode} ${map} ${size}`, ours.seconds / work);
      const { seconds } = ours;
      const line = { name: 'kernel', mode, map, size, work, seconds, rate: work / seconds } as const;
      for (const [against, yardstick] of yardsticks) {
        const timed = theirs.get(against);
        if (timed) printLine({ ...line, against, ratio: timed.seconds / ours.seconds });
        else if ('reason' in yardstick)
          printLine({ ...line, against, ratio: null, reason: yardstick.reason });
      }
      // How far C at the machine's full width is ahead of the array script, in one thread like ours.
      const native = theirs.get('c-native');
      for (const against of ['scipy', 'scipy-tuned'] as const) {
        const script = theirs.get(against);
        if (!native || !script) continue;
        const ofC = { engine: 'c-native', seconds: native.seconds, rate: work / native.seconds } as const;
        printLine({ ...line, ...ofC, against, ratio: script.seconds / native.seconds });
      }
      if (map === 'sparse')
        printLine({
          ...line,
          against: 'full-map',
          ratio: costOf(mode, 'full', size) / costOf(mode, map, size),
        });
      if (size > 500)
        printLine({ ...line, against: 'size-500', ratio: costOf(mode, map, 500) / costOf(mode, map, size) });
      if (size === 4000 && map === 'full') {
        const bytes = ours.bytes / (size * size) + besideKernel;
        printLine({ ...line, name: 'memory', rate: bytes, against: '24-bytes', ratio: 24 / bytes });
      }
    }
folder.close();
