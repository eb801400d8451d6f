import type { Work } from '#contract/works.ts';
import { areaCells } from '#sim-core/process/area-cells.ts';
import { cellAt, cellIndex, type Grid } from '#sim-core/grid/grid.ts';
import { occupiedFrom } from '#sim-core/measure/cover-measures.ts';
import { formatCounted } from '#app/lib/formats.ts';

/** Works on ground where the plant stood already at the survey: money that may bring little. */
export interface StandingWorks {
  readonly ids: ReadonlySet<string>;
  /** `2 mounds, 30 clumps and 1 planting`; empty where none does */
  readonly words: string;
}

const none: StandingWorks = { ids: new Set(), words: '' };

/**
 * The mounds and plantings that stand on marsh already: on cells that count as occupied at the survey; an outline, where
 * that holds for half of its cells or more.
 *
 * @param cover at the survey in 8 bits, row-major; undefined while not known
 */
export function standingWorks(
  works: readonly Work[],
  grid: Grid,
  cover: Uint8Array | undefined,
): StandingWorks {
  if (!cover) return none;
  const ids = new Set<string>();
  let [mounds, clumps, plantings] = [0, 0, 0];
  const occupied = (cell: number) => cover[cell] / 255 >= occupiedFrom;
  const standsAt = (x: number, y: number) => {
    const cell = cellAt(grid, x, y);
    return cell !== undefined && occupied(cellIndex(grid, cell.column, cell.row));
  };
  const mounded = new Set(works.flatMap((work) => (work.kind === 'mound' ? [`${work.x} ${work.y}`] : [])));
  for (const work of works) {
    if (work.kind === 'mound' && standsAt(work.x, work.y)) mounds++;
    else if (work.kind === 'clumps') {
      const there = work.points.filter(([x, y]) => standsAt(x, y));
      if (there.length === 0) continue;
      // Clumps on a mound count as part of it.
      if (work.points.length > 1 || !mounded.has(work.points[0].join(' ')))
        clumps += there.length * work.each;
    } else if (work.kind === 'planting') {
      const { cells } = areaCells(work.area, grid);
      if (cells.length === 0 || cells.filter(occupied).length * 2 < cells.length) continue;
      plantings++;
    } else continue;
    ids.add(work.id);
  }
  const counts = [
    mounds > 0 && formatCounted(mounds, 'mound'),
    clumps > 0 && formatCounted(clumps, 'clump'),
    plantings > 0 && formatCounted(plantings, 'planting'),
  ].filter((words) => words !== false);
  const words =
    counts.length > 1
      ? `${counts.slice(0, -1).join(', ')} and ${counts[counts.length - 1]}`
      : (counts[0] ?? '');
  return { ids, words };
}
