import { measureCover } from '#sim-core/measure/cover-measures.ts';
import { edgeDisplacement, type EdgeDisplacement } from './edge-displacement.ts';
import { agreementOf, bare, standing, unknown, type Agreement } from './map-agreement.ts';

/** Share of a cell's capacity from which it counts as standing when two maps are compared. */
export const standingFrom = 0.5;

/** A survey of a later year on the cells of a run. */
export interface Resurvey {
  readonly year: number;
  /** `bare`, `standing` or `unknown`, row-major */
  readonly cells: Uint8Array;
  /** covered area where the survey says anything, m² */
  readonly coveredArea: number;
  /** border between standing and bare cells there, m */
  readonly edgeLength: number;
}

export interface Cells {
  readonly width: number;
  readonly height: number;
  /** m */
  readonly cellSize: number;
}

/**
 * A survey as fits compare it: ground that cannot hold the plant, or of which the survey says nothing, is left out.
 *
 * @param cover shares 0..1, NaN where the survey says nothing; row-major
 * @param capacity K in bytes, row-major
 */
export function resurveyOf(
  year: number,
  cover: ArrayLike<number>,
  capacity: Uint8Array,
  cells: Cells,
): Resurvey {
  const values = new Uint8Array(capacity.length);
  const known = new Float32Array(capacity.length);
  for (let i = 0; i < values.length; i++) {
    if (capacity[i] === 0 || Number.isNaN(cover[i])) {
      values[i] = unknown;
      continue;
    }
    const held = Math.min(cover[i], capacity[i] / 255);
    known[i] = held;
    values[i] = held >= (standingFrom * capacity[i]) / 255 ? standing : bare;
  }
  return { year, cells: values, ...amountsOf(values, known, values, cells) };
}

/** The cells where plants stand in a run, told as in a survey: 1 or 0, row-major. */
export function standingCells(cover: Float32Array, capacity: Uint8Array): Uint8Array {
  return Uint8Array.from(cover, (c, i) =>
    capacity[i] > 0 && c >= Math.fround((standingFrom * capacity[i]) / 255) ? 1 : 0,
  );
}

/** Covered area and the border between standing and bare cells, where a survey says anything. */
export function amountsOf(
  survey: Uint8Array,
  cover: Float32Array,
  isStanding: Uint8Array,
  { width, height, cellSize }: Cells,
) {
  let sum = 0;
  const shown = new Float32Array(survey.length);
  for (let i = 0; i < shown.length; i++) {
    if (survey[i] === unknown) continue;
    sum += cover[i];
    shown[i] = isStanding[i];
  }
  const { edges } = measureCover(shown, width, height);
  return { coveredArea: sum * cellSize ** 2, edgeLength: edges * cellSize };
}

/** How a run's year compares with a survey of that year. */
export interface YearFit {
  readonly year: number;
  readonly coveredArea: number;
  readonly edgeLength: number;
  readonly agreement: Agreement;
  readonly edge: EdgeDisplacement | undefined;
}

/** Compares C of a run's year, row-major, with the survey of that year. */
export function fitOfYear(
  survey: Resurvey,
  cover: Float32Array,
  capacity: Uint8Array,
  cells: Cells,
): YearFit {
  const simulated = standingCells(cover, capacity);
  return {
    year: survey.year,
    ...amountsOf(survey.cells, cover, simulated, cells),
    agreement: agreementOf(survey.cells, simulated),
    edge: edgeDisplacement(survey.cells, simulated, cells),
  };
}
