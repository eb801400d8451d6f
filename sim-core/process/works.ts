import type { Grid } from '#sim-core/grid/grid.ts';
import { binomialQuantile } from '#sim-core/random/binomial.ts';
import { cellLuck, processes } from '#sim-core/random/cell-luck.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { Action, Clumps, Mound } from '#sim-core/spec/run-spec.ts';
import { areaCells, wholeGrid, type AreaCells } from './area-cells.ts';
import type { DatedLoss } from './expected-losses.ts';
import { standingFences, type Fence } from './fences.ts';
import { moundStrengths, type MoundStrengths } from './mound-strengths.ts';
import { plantedClumps, setPlantedClumps, type PlantedClumps } from './planted-clumps.ts';
import { setClumps, type WorksMap } from './works-map.ts';

/** The works and losses of one year, rasterised. */
interface YearWorks {
  readonly plantings: (AreaCells & { readonly cover: number })[];
  readonly clumps: PlantedClumps[];
  readonly mounds: MoundStrengths[];
  readonly losses: (AreaCells & { readonly loss: number })[];
}

/** Works and one-off losses of a run, rasterised once. */
export interface Works {
  /** what cannot be carried out, at its action */
  readonly problems: readonly FieldProblem[];
  /**
   * Carries out what is dated `year`: plantings, then clumps, mounds, and losses; and where there are grazers, raises the
   * fences that stand from this year on and takes away those that stood until the year before.
   *
   * @param index first step of the year: part of the counter of every draw
   * @returns ΣC that the losses removed, in cells
   */
  apply(year: number, index: number, map: WorksMap): number;
}

/**
 * @param capacity K of each cell, where it is known: clumps on ground that cannot hold the plant are then among the
 *   problems
 * @param losses of the outlook, which come before those of the option, so that options share their luck in them
 */
export function prepareWorks(
  actions: readonly Action[],
  grid: Grid,
  capacity?: Uint8Array,
  losses: readonly DatedLoss[] = [],
): Works {
  const years = new Map<number, YearWorks>();
  const fences: Fence[] = [];
  const problems: FieldProblem[] = [];
  const worksOf = (year: number): YearWorks => {
    const works = years.get(year) ?? { plantings: [], clumps: [], mounds: [], losses: [] };
    years.set(year, works);
    return works;
  };
  losses.forEach(({ years: met, share, area }, i) => {
    const cells = area ? areaCells(area, grid) : wholeGrid(grid);
    if (cells.cells.length === 0)
      problems.push({
        field: `losses.${i}.area`,
        message: 'This loss reaches no cell of the grid: move it onto the site',
      });
    for (const year of met) worksOf(year).losses.push({ ...cells, loss: share });
  });
  actions.forEach((action, i) => {
    const works = worksOf(action.year);
    if (action.kind === 'clumps') {
      const planted = plantedClumps(action, grid, capacity);
      works.clumps.push(planted);
      problems.push(...pointProblems(planted, i));
      return;
    }
    const { cells } = action.kind === 'mound' ? addMound(action, works) : addArea(action, works);
    if (cells.length === 0)
      problems.push({
        field: `actions.${i}`,
        message: `This ${action.kind} reaches no cell of the grid: move it onto the site${
          action.kind !== 'mound' && action.area.shape === 'polygon' ? ', or draw it larger than a cell' : ''
        }`,
      });
  });

  function addMound(action: Mound, works: YearWorks) {
    const mound = moundStrengths(action, grid);
    works.mounds.push(mound);
    return mound;
  }
  function addArea(action: Exclude<Action, Mound | Clumps>, works: YearWorks) {
    const area = areaCells(action.area, grid);
    if (action.kind === 'planting') works.plantings.push({ ...area, cover: action.cover });
    if (action.kind === 'loss') works.losses.push({ ...area, loss: action.share });
    if (action.kind === 'fence')
      fences.push({ ...area, strength: action.strength, from: action.year, until: action.until });
    return area;
  }

  return {
    problems,
    apply(year, index, map) {
      if (map.kernel.fence && fences.some(({ from, until }) => from === year || until === year - 1))
        standingFences(fences, year, map.fence, map.kernel.fence);
      const works = years.get(year);
      if (!works) return 0;
      const { kernel } = map;
      for (const planting of works.plantings) plant(planting, index, map);
      for (const clumps of works.clumps) setPlantedClumps(clumps, grid, map);
      for (const { cells, strengths } of works.mounds)
        cells.forEach((cell, j) => {
          if (strengths[j] > kernel.refugeAt(cell)) kernel.setRefuge(cell, strengths[j]);
        });
      const lost = works.losses.reduce((sum, loss, order) => sum + remove(loss, order, index, map), 0);
      kernel.changed();
      return lost;
    },
  };
}

/** Raises cover to the planted amount, never above capacity; a broken clump is set by the cell's luck. */
function plant(planting: YearWorks['plantings'][number], index: number, map: WorksMap): void {
  const { cover, clumps } = map.kernel;
  const luck = cellLuck(map.luck, index, map.replicate, processes.events);
  for (const cell of planting.cells) {
    const capacity = Math.fround(map.capacity[cell] / 255);
    const planted = Math.min(planting.cover * planting.share, capacity);
    if (!clumps) cover[cell] = Math.max(cover[cell], planted);
    else if (planted > 0)
      setClumps(map, cell, Math.max(clumps[cell], wholeClumps(planted, cell, map, luck(cell).free)));
  }
}

/** Removes a share of the cover, clump by clump where clumps are counted; ΣC that went. */
function remove(
  { cells, share, loss }: YearWorks['losses'][number],
  order: number,
  index: number,
  map: WorksMap,
): number {
  const { cover, clumps } = map.kernel;
  const through = 1 - loss * share;
  // A second loss in the same year must not meet the same luck.
  const luck = cellLuck(map.luck, index, map.replicate, processes.events + (order << 8));
  let lost = 0;
  for (const cell of cells) {
    const before = cover[cell];
    if (before === 0) continue;
    if (clumps) setClumps(map, cell, binomialQuantile(luck(cell).standing, clumps[cell], through));
    else cover[cell] = before * through;
    lost += before - cover[cell];
  }
  return lost;
}

/**
 * Clumps that make up a share of a cell: whole ones, and one more with the chance of the rest, so that no cover is made
 * or lost on average.
 */
export function wholeClumps(
  cover: number,
  cell: number,
  { capacity, sites }: Pick<WorksMap, 'capacity' | 'sites'>,
  u: number,
): number {
  const k = capacity[cell];
  const clumps = (cover / (k / 255)) * sites[k];
  // What 32-bit cover cannot tell from a whole clump is one.
  const nearest = Math.round(clumps);
  return Math.min(sites[k], Math.abs(clumps - nearest) < 1e-4 ? nearest : Math.floor(clumps + u));
}

/** Points that can take no clump, each kind at the first of them. */
function pointProblems({ offGrid, cannotGrow }: PlantedClumps, action: number): FieldProblem[] {
  const say = (points: number[], where: string): FieldProblem[] =>
    points.length === 0
      ? []
      : [
          {
            field: `actions.${action}.points.${points[0]}`,
            message: `${
              points.length === 1
                ? `Point ${points[0] + 1} of these clumps lies`
                : `${points.length} points of these clumps, the first of them point ${points[0] + 1}, lie`
            } ${where}`,
          },
        ];
  return [
    ...say(offGrid, 'off the grid: move or remove what lies off the site'),
    ...say(cannotGrow, 'where the plant cannot grow (capacity 0): move or remove what lies there'),
  ];
}
