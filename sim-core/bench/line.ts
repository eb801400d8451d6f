/** One figure of the bench, beside what it is held against in the same run. */
export interface Line {
  readonly name:
    | 'kernel'
    | 'memory'
    | 'frames'
    | 'ensemble'
    | 'arrival'
    | 'comparison'
    | 'waiting'
    | 'page-memory'
    | 'page';
  readonly mode: string;
  readonly map: string;
  /** cells on a side, or width × height */
  readonly size: number | string;
  readonly against: string;
  /** whose figure this is, where it is not ours: a yardstick that is held against another */
  readonly engine?: string;
  /** what was done: cells stepped in the fastest round; of frames and arrival, their cells; of an ensemble, its steps */
  readonly work: number;
  /** time of the processor; of an ensemble, of a page and beside a clock, by the clock */
  readonly seconds: number;
  /** work a second; of memory, bytes a cell; of frames, bytes a cell and year; of waiting, ms */
  readonly rate: number;
  /** above 1: we are faster, or smaller. null where there is nothing to hold it against, and `reason` says why */
  readonly ratio: number | null;
  readonly reason?: string;
  /** processes that wanted to run, on average over the last minute: where the clock is read, other work counts */
  readonly load?: number;
}

const json = process.argv.includes('--json');

const figure = ({ name, rate, seconds }: Line): string => {
  if (name === 'memory') return `${rate.toFixed(1)} bytes a cell`;
  if (name === 'frames') return `${rate.toFixed(3)} bytes a cell, year`;
  if (name === 'waiting') return `${rate.toFixed(0)} ms`;
  if (name === 'page-memory') return `${(rate / 1e6).toFixed(0)} MB`;
  if (name === 'ensemble' || name === 'comparison') return `${rate.toFixed(0)} steps/s`;
  if (name === 'page') return `${(seconds * 1000).toFixed(0)} ms`;
  return `${(rate / 1e6).toFixed(1)} M cells/s`;
};

/** Prints a line for people, or with --json as one JSON object. */
export function printLine(line: Line): void {
  if (json) {
    console.log(JSON.stringify(line));
    return;
  }
  const { name, mode, map, size, against, engine, ratio, reason, load } = line;
  console.log(
    [
      name.padEnd(11),
      mode.padEnd(11),
      map.padEnd(7),
      String(size).padStart(9),
      figure(line).padStart(24),
    ].join(' '),
    against.padStart(12),
    ratio?.toFixed(2).padStart(8) ?? `skipped: ${reason}`,
    engine === undefined ? '' : `(not ours: ${engine})`,
    load === undefined ? '' : `(load ${load.toFixed(1)})`,
  );
}
