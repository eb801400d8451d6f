import type { Work } from '#contract/works.ts';
import type { Area } from '#sim-core/spec/run-spec.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { GroundPoint } from '#app/map/rings.ts';

const toCentimetre = (metres: number) => Math.round(metres * 100) / 100;

/** One of the works, moved by so many metres; everything else about it stays. */
export function movedWork(work: Work, dx: number, dy: number): Work {
  const shift = ([x, y]: GroundPoint): [number, number] => [toCentimetre(x + dx), toCentimetre(y + dy)];
  if (work.kind === 'mound') return { ...work, x: toCentimetre(work.x + dx), y: toCentimetre(work.y + dy) };
  if (work.kind === 'clumps') return { ...work, points: work.points.map(shift) };
  const { area } = work;
  const moved: Area =
    area.shape === 'disc'
      ? { ...area, x: toCentimetre(area.x + dx), y: toCentimetre(area.y + dy) }
      : {
          ...area,
          ring: area.ring.map(shift),
          ...(area.holes && { holes: area.holes.map((hole) => hole.map(shift)) }),
        };
  return { ...work, area: moved };
}

/** Copies with ids of their own, moved by so many metres. They were not laid as a set. */
export const copiedWorks = (works: readonly Work[], dx: number, dy: number, newId: () => string): Work[] =>
  works.map((work) => ({ ...movedWork(work, dx, dy), id: newId(), set: undefined, name: undefined }));

/** The middle of the cell that holds a place (also beyond the site, as if the cells went on). */
export function snappedToMiddle({ originX, originY, cellSize }: Grid, [x, y]: GroundPoint): GroundPoint {
  const middle = (metres: number) => (Math.floor(metres / cellSize) + 0.5) * cellSize;
  return [toCentimetre(originX + middle(x - originX)), toCentimetre(originY - middle(originY - y))];
}

/** The nearest corner of the cells. */
export function snappedToCorner({ originX, originY, cellSize }: Grid, [x, y]: GroundPoint): GroundPoint {
  const corner = (metres: number) => Math.round(metres / cellSize) * cellSize;
  return [toCentimetre(originX + corner(x - originX)), toCentimetre(originY - corner(originY - y))];
}
