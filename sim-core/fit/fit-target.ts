import type { Figure } from '#sim-core/spec/fit-figure.ts';
import { distanceTo } from '#sim-core/measure/distance-transform.ts';
import { edgeDisplacement } from './edge-displacement.ts';
import { bare, standing, unknown } from './map-agreement.ts';
import { amountsOf, standingCells, type Cells, type Resurvey } from './resurvey.ts';

/** Covered area of the whole site in a later year, without a map: an entry of a cover series. */
export interface SurveyedArea {
  readonly year: number;
  /** m² */
  readonly area: number;
  /** standard error, m² */
  readonly error: number;
}

/** How fast edges moved between two years, outwards above 0. */
export interface SurveyedFront {
  readonly from: number;
  readonly until: number;
  /** m/yr */
  readonly speed: number;
  /** standard error, m/yr */
  readonly error: number;
}

/** A map of a later year, and how well its covered area is known. */
export interface SurveyedMap extends Resurvey {
  /** standard error of the covered area, m² */
  readonly areaError: number;
}

/** All that runs are compared with: plain data that goes to workers. */
export interface FitTarget {
  readonly cells: Cells;
  readonly maps: readonly SurveyedMap[];
  readonly areas: readonly SurveyedArea[];
  readonly fronts: readonly SurveyedFront[];
  /** m to the nearest cell that stood at the start, row-major; Infinity where none did */
  readonly fromStart: Float32Array;
}

/**
 * What runs are compared with.
 *
 * @param start cover at the survey that runs start from, shares, row-major; @param capacity K in bytes, row-major
 */
export function fitTarget(
  start: Float32Array,
  capacity: Uint8Array,
  cells: Cells,
  data: Pick<FitTarget, 'maps' | 'areas' | 'fronts'>,
): FitTarget {
  const { width, height, cellSize } = cells;
  const fromStart = distanceTo(standingCells(start, capacity), width, height).map((d) => d * cellSize);
  return { cells, ...data, fromStart };
}

/** The figures that a fit brings close, in the order of `figuresOfRun`. */
export function observedFigures({ maps, areas, fronts, fromStart }: FitTarget): Figure[] {
  return [
    ...maps.flatMap(({ year, cells, coveredArea, areaError, edgeLength }): Figure[] => [
      { kind: 'map area', year, observed: coveredArea, error: areaError },
      { kind: 'map edge', year, observed: edgeLength, error: 0 },
      {
        kind: 'map reach',
        year,
        observed: reachOf(cells, (i) => cells[i] === standing, fromStart),
        error: 0,
      },
    ]),
    ...areas.map(({ year, area, error }): Figure => ({ kind: 'area', year, observed: area, error })),
    ...fronts.map(({ until, speed, error }): Figure => ({
      kind: 'front',
      year: until,
      observed: speed,
      error,
    })),
  ];
}

/** Years of a run that its figures are taken from, ascending. */
export const yearsOfTarget = ({
  maps,
  areas,
  fronts,
}: Pick<FitTarget, 'maps' | 'areas' | 'fronts'>): number[] =>
  [
    ...new Set([
      ...maps.map(({ year }) => year),
      ...areas.map(({ year }) => year),
      ...fronts.flatMap(({ from, until }) => [from, until]),
    ]),
  ].sort((a, b) => a - b);

/**
 * The figures of a run, in the order of `observedFigures`. Where a map says nothing, the run counts nothing either.
 *
 * @param coverOf C of a year of `yearsOfTarget`, row-major
 * @param capacity K in bytes, row-major
 */
export function figuresOfRun(
  target: FitTarget,
  coverOf: (year: number) => Float32Array,
  capacity: Uint8Array,
): number[] {
  const { cells, fromStart } = target;
  return [
    ...target.maps.flatMap((map) => {
      const cover = coverOf(map.year);
      const stands = standingCells(cover, capacity);
      const { coveredArea, edgeLength } = amountsOf(map.cells, cover, stands, cells);
      return [coveredArea, edgeLength, reachOf(map.cells, (i) => stands[i] === 1, fromStart)];
    }),
    ...target.areas.map(({ year }) => coveredAreaOf(coverOf(year), cells.cellSize)),
    ...target.fronts.map((front) => frontOf(front, coverOf, capacity, cells)),
  ];
}

const coveredAreaOf = (cover: Float32Array, cellSize: number): number =>
  cover.reduce((sum, c) => sum + c, 0) * cellSize ** 2;

/** 0 where nothing stands, or nothing stood at the start. */
function reachOf(survey: Uint8Array, stands: (cell: number) => boolean, fromStart: Float32Array): number {
  let sum = 0;
  let count = 0;
  for (let i = 0; i < survey.length; i++)
    if (survey[i] !== unknown && stands(i) && fromStart[i] < Infinity) {
      sum += fromStart[i];
      count++;
    }
  return count > 0 ? sum / count : 0;
}

/** Mean advance of the run's edge between two years over the years between, m/yr; 0 where it had no edge in either. */
function frontOf(
  { from, until }: SurveyedFront,
  coverOf: (year: number) => Float32Array,
  capacity: Uint8Array,
  cells: Cells,
): number {
  const before = standingCells(coverOf(from), capacity).map((stands, i) =>
    capacity[i] === 0 ? unknown : stands ? standing : bare,
  );
  const moved = edgeDisplacement(before, standingCells(coverOf(until), capacity), cells);
  return moved ? moved.mean / (until - from) : 0;
}
