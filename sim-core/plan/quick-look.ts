import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { Action, StepsPerYear } from '#sim-core/spec/run-spec.ts';
import { arrivalField, type ArrivalChange } from '#sim-core/theory/arrival-field.ts';
import { localGrowth, type GrowthRates } from '#sim-core/theory/local-growth.ts';
import { referenceShares } from '#sim-core/theory/reference-cover.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';
import { closingTally, type ClosingSummary } from './closing-tally.ts';
import { workReach, type WorkReach } from './work-reach.ts';
import { workedCells } from './worked-cells.ts';

export interface QuickLookInput {
  readonly grid: Grid;
  readonly ground: Pick<Ground, 'capacity' | 'vigour' | 'refuge' | 'cover'>;
  readonly rates: GrowthRates & Pick<Rates, 'clumpsPerSquareMetre'>;
  readonly stepsPerYear: StepsPerYear;
  readonly surveyYear: number;
  /** years that are looked at */
  readonly years: number;
  /** m; of the cells that growth runs on, where those of the grid are but blocks of them */
  readonly growthCellSize?: number;
}

/** Works that come and go, each under a key of the caller's. */
export interface WorksChange<Key = number> {
  readonly removed: Iterable<Key>;
  readonly added: Iterable<readonly [Key, Action]>;
}

/** What the quick look leaves out, to be said wherever it is shown. */
export const quickLookLeavesOut =
  'A quick look takes growth alone: weather, ordinary background loss, chance, grazing, fences and the losses you expect are left out. Only a run takes them in.';

export interface QuickLook {
  /** year in which each cell closes, as a run reports it: 0 not by the horizon, −32768 cannot hold the plant */
  readonly years: Int16Array;
  /** years from the survey until growth reaches a cell, Infinity where it does not by the horizon */
  arrival(cell: number): number;
  /** years from the survey until a cell closes, in parts of years */
  closing(cell: number): number;
  /** Takes works away and adds others; works on what changes alone. */
  change(change: WorksChange): void;
  summary(): ClosingSummary;
  /** m² that the plant can cover in a cell */
  areaOf(cell: number): number;
  /** Years by which the mean arrival would come sooner with these works as well; leaves everything as it was. */
  gainOf(works: readonly Action[]): number;
}

/**
 * Closing years (half the reference) without a run, kept up while works are drawn: until growth arrives from the nearest
 * foothold in time, and then until the cell fills from the share at which it counts as occupied. A foothold below that
 * share starts once it has grown to it.
 *
 * Mounds make growth faster in the cells that they shelter, from their year on; plantings and clumps start growth in
 * theirs. Weather, background loss, chance, grazing, fences and losses are left out (`quickLookLeavesOut`).
 *
 * @throws RunProblem where no kernel gives the rates on such cells (`fitKernel`)
 */
export function createQuickLook(input: QuickLookInput): QuickLook {
  const { grid, ground, rates, stepsPerYear, surveyYear, years: horizon } = input;
  const { capacity, vigour, refuge, cover } = ground;
  const { width, height, cellSize } = grid;
  const cells = width * height;
  const cellArea = cellSize * cellSize;
  const growthCell = input.growthCellSize ?? cellSize;
  const growthOf = localGrowth(rates, growthCell, stepsPerYear);
  const references = referenceShares(stepRates(rates, stepsPerYear)).map((u) => Math.round(u * fineness));
  /** K u of a cell, in whole parts of `part` m² */
  const partsOf = (cell: number) => capacity[cell] * references[vigour[cell]];
  const part = cellArea / (255 * fineness);

  const crossing = Float32Array.from(vigour, (v, cell) =>
    capacity[cell] === 0 ? Infinity : cellSize / growthOf(v, refuge[cell]).speed,
  );
  const field = arrivalField({ width, height, crossing, latest: horizon });
  const tally = closingTally(cells, partsOf, part, surveyYear, horizon);
  const closable = tally.summary().closable / part;
  // On blocks of cells too, a clump is the start that it is on the cell it is set in.
  const worked = workedCells(capacity, rates.clumpsPerSquareMetre * growthCell * growthCell);
  const reaches = new Map<number, WorkReach>();
  /** years until what stands or is planted in a cell fills it by itself: on its ground, and on that of its mounds */
  const alone = new Float32Array(cells).fill(Infinity);
  const sheltered = new Map<
    number,
    { readonly alone: number; readonly fill: number; readonly from: number }
  >();

  for (let cell = 0; cell < cells; cell++) if (cover[cell] > 0) refresh(cell);
  follow(field.update());
  for (let cell = 0; cell < cells; cell++) if (alone[cell] <= horizon) tally.set(cell, closing(cell));

  /** Works out anew what starts growth in a cell, and how fast it grows. */
  function refresh(cell: number): void {
    if (crossing[cell] === Infinity) return;
    const works = worked.at(cell);
    const stands = Math.min(1, cover[cell] / (capacity[cell] / 255));
    const planted = [...(works?.planted ?? [])];
    if (stands > 0) planted.push({ after: 0, share: stands });
    const plain = growthOf(vigour[cell], refuge[cell]);
    const fill = plain.fromOccupied;
    const shelter = works && works.refuge > refuge[cell] ? growthOf(vigour[cell], works.refuge) : undefined;
    const from = shelter && works ? works.refugeFrom : Infinity;
    const fastFill = shelter?.fromOccupied ?? fill;
    let start = Infinity;
    let own = Infinity;
    let fastOwn = Infinity;
    for (const { after, share } of planted) {
      const slow = plain.fill(share);
      const fast = shelter?.fill(share) ?? slow;
      own = Math.min(own, after + slow);
      fastOwn = Math.min(fastOwn, after + fast);
      const slowStart = after + Math.max(0, slow - fill);
      start = Math.min(start, hurried(slowStart, after + Math.max(0, fast - fastFill), from));
    }
    alone[cell] = own;
    if (shelter) sheltered.set(cell, { alone: fastOwn, fill: fastFill, from });
    else sheltered.delete(cell);
    field.setStart(cell, start);
    field.setFaster(cell, shelter ? cellSize / shelter.speed : Infinity, from);
  }

  function closing(cell: number): number {
    if (crossing[cell] === Infinity) return Infinity;
    const arrival = field.time(cell);
    const slow = Math.min(alone[cell], arrival + growthOf(vigour[cell], refuge[cell]).fromOccupied);
    const shelter = sheltered.get(cell);
    if (!shelter) return slow;
    return hurried(slow, Math.min(shelter.alone, arrival + shelter.fill), shelter.from);
  }

  function follow({ cells: changed, count }: ArrivalChange): void {
    for (let i = 0; i < count; i++) tally.set(changed[i], closing(changed[i]));
  }

  return {
    years: tally.years,
    arrival: (cell) => field.time(cell),
    closing,
    summary: () => tally.summary(),
    areaOf: (cell) => partsOf(cell) * part,
    change({ removed, added }) {
      const dirty = new Set<number>();
      for (const key of removed) {
        const reach = reaches.get(key);
        if (!reach) continue;
        reaches.delete(key);
        worked.remove(reach);
        for (const cell of reach.cells) dirty.add(cell);
      }
      for (const [key, action] of added) {
        const reach = workReach(action, grid, surveyYear, capacity);
        if (!reach) continue;
        reaches.set(key, reach);
        worked.add(reach);
        for (const cell of reach.cells) dirty.add(cell);
      }
      for (const cell of dirty) refresh(cell);
      follow(field.update());
      for (const cell of dirty) tally.set(cell, closing(cell));
    },
    gainOf(works) {
      const tried = works
        .map((action) => workReach(action, grid, surveyYear, capacity))
        .filter((reach) => reach !== undefined);
      const dirty = new Set(tried.flatMap(({ cells: reached }) => [...reached]));
      for (const reach of tried) worked.add(reach);
      for (const cell of dirty) refresh(cell);
      const { cells: changed, before, count } = field.update();
      let gain = 0;
      for (let i = 0; i < count; i++) {
        const [was, is] = [Math.min(before[i], horizon), Math.min(field.time(changed[i]), horizon)];
        gain += partsOf(changed[i]) * (was - is);
      }
      field.rollBack();
      for (const reach of tried) worked.remove(reach);
      for (const cell of dirty) refresh(cell);
      return closable > 0 ? gain / closable : 0;
    },
  };
}

/** Parts of a reference share u that are told apart. */
const fineness = 65_536;

/** Slow until it turns fast: what is under way by then comes no sooner than that. */
const hurried = (slow: number, fast: number, from: number): number =>
  slow > from ? Math.max(from, fast) : slow;
