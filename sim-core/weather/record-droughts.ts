import type { YearIndex } from './yearly-record.ts';

/** A drought of a record: years in a row at or below a threshold. */
export interface RecordDrought {
  readonly from: number;
  readonly until: number;
  readonly years: number;
  /** mean and driest index of its years */
  readonly meanIndex: number;
  readonly driestIndex: number;
  /** the record begins, ends or breaks off within it, so that it may have been longer */
  readonly cutShort: boolean;
}

/** What a record says about how droughts come back. */
export interface RecordDroughts {
  readonly droughts: readonly RecordDrought[];
  /** years from one beginning to the next, where no gap lies between */
  readonly intervals: readonly number[];
  /** years from the beginning of an unbroken stretch of record to the first beginning in it, by stretch */
  readonly firstWaits: readonly number[];
  /** years from the last beginning in a stretch to its end, by stretch */
  readonly lastWaits: readonly number[];
  /** length of stretches in which no drought begins */
  readonly without: readonly number[];
}

/**
 * Droughts of a record. A gap ends one stretch and begins another: nothing is said across it. In a stretch that begins
 * dry nobody knows when that drought began: it is listed, but its beginning is not counted.
 *
 * @param years ascending
 */
export function recordDroughts(years: readonly YearIndex[], threshold: number): RecordDroughts {
  const found = { droughts: [], intervals: [], firstWaits: [], lastWaits: [], without: [] } as {
    droughts: RecordDrought[];
    intervals: number[];
    firstWaits: number[];
    lastWaits: number[];
    without: number[];
  };
  for (const stretch of stretches(years)) {
    const begins = stretch[0].year;
    const ends = stretch[stretch.length - 1].year;
    const droughts = droughtsIn(stretch, threshold);
    found.droughts.push(...droughts);
    const known = droughts.filter(({ from }) => from > begins).map(({ from }) => from);
    if (known.length === 0) {
      found.without.push(ends - begins + 1);
      continue;
    }
    found.firstWaits.push(known[0] - begins);
    known.slice(1).forEach((from, i) => found.intervals.push(from - known[i]));
    found.lastWaits.push(ends + 1 - known[known.length - 1]);
  }
  return found;
}

function stretches(years: readonly YearIndex[]): YearIndex[][] {
  const found: YearIndex[][] = [];
  for (const each of years) {
    const last = found.at(-1);
    if (last && last[last.length - 1].year === each.year - 1) last.push(each);
    else found.push([each]);
  }
  return found;
}

function droughtsIn(stretch: readonly YearIndex[], threshold: number): RecordDrought[] {
  const found: RecordDrought[] = [];
  let dry: YearIndex[] = [];
  const close = (cut: boolean) => {
    if (dry.length === 0) return;
    const indices = dry.map(({ index }) => index);
    found.push({
      from: dry[0].year,
      until: dry[dry.length - 1].year,
      years: dry.length,
      meanIndex: indices.reduce((sum, x) => sum + x, 0) / dry.length,
      driestIndex: Math.min(...indices),
      cutShort: cut || dry[0].year === stretch[0].year,
    });
    dry = [];
  };
  for (const each of stretch)
    if (each.index <= threshold) dry.push(each);
    else close(false);
  close(true);
  return found;
}
