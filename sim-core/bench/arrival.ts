import { execFileSync, spawnSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { stream } from '#sim-core/random/streams.ts';
import { arrivalField, type ArrivalField } from '#sim-core/theory/arrival-field.ts';
import { printLine } from './line.ts';
import { benchFolder } from './yardstick.ts';

/**
 * How fast arrival times are solved from scratch, beside the same scheme in C, and brought up to one foothold that moves.
 * Times are those of the processor; the fastest of three.
 */

/** Uneven ground with obstacles, and footholds on it; everything is reached. */
interface ArrivalCase {
  readonly size: number;
  readonly crossing: Float32Array;
  readonly starts: readonly { readonly cell: number; readonly years: number }[];
}

function arrivalCase(size: number): ArrivalCase {
  const random = stream('bench arrival', 'parameters');
  const crossing = Float32Array.from({ length: size * size }, () =>
    random.quick() < 0.02 ? Infinity : 1.8 + 0.4 * random.quick(),
  );
  const starts = Array.from({ length: 40 }, () => {
    const cell = Math.floor(size * size * random.quick());
    crossing[cell] = 2;
    return { cell, years: 5 * random.quick() };
  });
  return { size, crossing, starts };
}

const secondsOf = (work: () => void): number => {
  const start = process.cpuUsage();
  work();
  const { user, system } = process.cpuUsage(start);
  return (user + system) / 1e6;
};
const latest = 20_000;
function solve({ size, crossing, starts }: ArrivalCase): { field: ArrivalField; seconds: number } {
  const field = arrivalField({ width: size, height: size, crossing, latest });
  for (const { cell, years } of starts) field.setStart(cell, years);
  return { field, seconds: secondsOf(() => field.update()) };
}

/** Mean time to bring the map up to one foothold that moves by 30 cells, each of them once there and back. */
function moveOne(field: ArrivalField, { starts, size }: ArrivalCase): number {
  let seconds = 0;
  const places = starts.filter(({ cell }) => cell % size < size - 30 && field.time(cell + 30) < Infinity);
  for (const { cell, years } of places)
    for (const [from, to] of [
      [cell, cell + 30],
      [cell + 30, cell],
    ])
      seconds += secondsOf(() => {
        field.setStart(from, Infinity);
        field.setStart(to, years);
        field.update();
      });
  return seconds / (2 * places.length);
}

function write(file: string, { size, crossing, starts }: ArrivalCase): void {
  const parts = [
    Int32Array.of(size, size, 3, starts.length),
    crossing,
    Int32Array.from(starts, ({ cell }) => cell),
    Float32Array.from(starts, ({ years }) => years),
  ];
  writeFileSync(file, '');
  for (const { buffer } of parts) writeFileSync(file, new Uint8Array(buffer), { flag: 'a' });
}

function compile(program: string) {
  if (spawnSync('cc', ['--version']).status !== 0) return { reason: 'there is no C compiler (cc)' };
  const source = join(import.meta.dirname, 'arrival-yardstick.c');
  const compiled = spawnSync('cc', ['-O3', '-o', program, source, '-lm'], { encoding: 'utf8' });
  if (compiled.status !== 0) return { reason: `cc failed: ${compiled.stderr.trim()}` };
  return {
    time: (file: string) => {
      const [seconds, sum] = execFileSync(program, [file], { encoding: 'utf8' })
        .trim()
        .split(' ')
        .map(Number);
      return { seconds, sum };
    },
  };
}

function refuseOtherTimes(field: ArrivalField, cells: number, theirs: number): void {
  let ours = 0;
  for (let cell = 0; cell < cells; cell++) if (field.time(cell) < Infinity) ours += field.time(cell);
  if (!(Math.abs(ours / theirs - 1) < 1e-6))
    throw new Error(`The times add up to ${ours} here and to ${theirs} in C`);
}

// Until the engine has compiled the solver in earnest.
solve(arrivalCase(500));
const folder = benchFolder();
const yardstick = compile(folder.path('arrival-yardstick'));
for (const size of [1000, 2000]) {
  const bench = arrivalCase(size);
  const file = folder.path('arrival.bin');
  write(file, bench);
  let seconds = Infinity;
  let field!: ArrivalField;
  let theirs: { seconds: number; sum: number } | undefined;
  for (let turn = 0; turn < 3; turn++) {
    const solved = solve(bench);
    field = solved.field;
    seconds = Math.min(seconds, solved.seconds);
    if ('reason' in yardstick) continue;
    const timed = yardstick.time(file);
    if (timed.seconds < (theirs?.seconds ?? Infinity)) theirs = timed;
  }
  const work = size * size;
  const line = { name: 'arrival', mode: 'times', size, work } as const;
  const full = { ...line, map: 'full-solve', seconds, rate: work / seconds };
  if ('reason' in yardstick) printLine({ ...full, against: 'c', ratio: null, reason: yardstick.reason });
  else if (theirs) {
    refuseOtherTimes(field, work, theirs.sum);
    printLine({ ...full, against: 'c', ratio: theirs.seconds / seconds });
  }
  const moved = moveOne(field, bench);
  printLine({
    ...line,
    map: 'move-one',
    seconds: moved,
    rate: work / moved,
    against: 'full-solve',
    ratio: seconds / moved,
  });
}
folder.close();
