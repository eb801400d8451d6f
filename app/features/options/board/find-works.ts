import type { Work } from '#contract/works.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import type { GroundPoint } from '#app/map/rings.ts';
import { placeOf } from '#contract/works-words.ts';

export interface Found {
  readonly id: string;
  readonly x: number;
  readonly y: number;
}

/** The next of all that stands on the map, or the one before: what people plan first, as there may be many surveyed. */
export function nextOnMap(
  works: readonly Work[],
  surveyed: readonly MapFoothold[],
  from: string | undefined,
  step: 1 | -1,
): Found | undefined {
  const count = works.length + surveyed.length;
  if (count === 0) return undefined;
  const at = (i: number): Found =>
    i < works.length ? { id: works[i].id, ...placeOf(works[i]) } : surveyed[i - works.length];
  const planned = works.findIndex((work) => work.id === from);
  const found = surveyed.findIndex((f) => f.id === from);
  const now = planned >= 0 ? planned : found >= 0 ? works.length + found : step > 0 ? -1 : 0;
  const { id, x, y } = at((now + step + count) % count);
  return { id, x, y };
}

/** Works that lie wholly inside a box of the ground. */
export function worksInBox(works: readonly Work[], [ax, ay]: GroundPoint, [bx, by]: GroundPoint): Work[] {
  const inside = ([x, y]: GroundPoint) =>
    x >= Math.min(ax, bx) && x <= Math.max(ax, bx) && y >= Math.min(ay, by) && y <= Math.max(ay, by);
  return works.filter((work) => {
    if (work.kind === 'mound') return inside([work.x, work.y]);
    if (work.kind === 'clumps') return work.points.every(inside);
    const { area } = work;
    return area.shape === 'polygon'
      ? area.ring.every(inside)
      : inside([area.x - area.radius, area.y - area.radius]) &&
          inside([area.x + area.radius, area.y + area.radius]);
  });
}
