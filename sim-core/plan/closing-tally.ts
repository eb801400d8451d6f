import { cannotClose, stillOpen } from '#sim-core/measure/closing.ts';

/** What a map of closing years comes to; every cell counts for the area that the plant can cover there, K u Δx². */
export interface ClosingSummary {
  /** m², all ground that can close */
  readonly closable: number;
  /** m² closed by the end of each year, from the survey year to the horizon */
  readonly closedBy: readonly { readonly year: number; readonly area: number }[];
  /** first year by which half, 80 % and 90 % of the closable ground have closed; undefined: not by the horizon */
  readonly half: number | undefined;
  readonly eighty: number | undefined;
  readonly ninety: number | undefined;
}

/** Closing years of all cells and their sums, kept up cell by cell. */
export interface ClosingTally {
  /** as in a run: year in which each cell closes, 0 not by the horizon, −32768 cannot hold the plant; the survey year stood */
  readonly years: Int16Array;
  set(cell: number, after: number): void;
  summary(): ClosingSummary;
}

/** A hair that rounding may leave above a whole year. */
const hair = 1e-4;

/**
 * @param parts what the plant can cover in a cell, in whole parts, so that sums stay exact however often they are
 * changed; 0 where it cannot grow
 * @param part m² of one part
 */
export function closingTally(
  cells: number,
  parts: (cell: number) => number,
  part: number,
  surveyYear: number,
  horizon: number,
): ClosingTally {
  const years = new Int16Array(cells).fill(cannotClose);
  const closing = new Float64Array(horizon + 1);
  let closable = 0;
  for (let cell = 0; cell < cells; cell++) {
    const here = parts(cell);
    if (here === 0) continue;
    years[cell] = stillOpen;
    closable += here;
  }
  return {
    years,
    set(cell, after) {
      const before = years[cell];
      if (before === cannotClose) return;
      const wait = Math.ceil(after - hair);
      const year = wait <= horizon ? surveyYear + Math.max(0, wait) : stillOpen;
      if (year === before) return;
      const here = parts(cell);
      if (before !== stillOpen) closing[before - surveyYear] -= here;
      if (year !== stillOpen) closing[year - surveyYear] += here;
      years[cell] = year;
    },
    summary() {
      let closed = 0;
      const closedBy = Array.from(closing, (more, i) => ({ year: surveyYear + i, parts: (closed += more) }));
      const yearOf = (share: number) =>
        closable > 0 ? closedBy.find((by) => by.parts >= share * closable)?.year : undefined;
      return {
        closable: closable * part,
        closedBy: closedBy.map(({ year, parts: sum }) => ({ year, area: sum * part })),
        half: yearOf(0.5),
        eighty: yearOf(0.8),
        ninety: yearOf(0.9),
      };
    },
  };
}
