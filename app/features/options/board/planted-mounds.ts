import type { Work } from '#contract/works.ts';
import type { PenMound } from '../mound-pen.ts';

/** A mound at a place, and the clumps that are set on it, if any: nothing grows from a bare mound by itself. */
export function plantedMound(
  newId: () => string,
  { clumps, ...mound }: PenMound,
  at: { x: number; y: number; year: number; set?: string },
): Work[] {
  const { x, y, year, set } = at;
  const works: Work[] = [{ kind: 'mound', id: newId(), set, year, x, y, ...mound }];
  if (clumps > 0) works.push({ kind: 'clumps', id: newId(), set, year, points: [[x, y]], each: clumps });
  return works;
}

/** The one place that works stand on, or undefined for works of several places or of an outline. */
function placeKey(work: Work): string | undefined {
  if (work.kind === 'mound') return `${work.x} ${work.y}`;
  if (work.kind === 'clumps') return work.points.length === 1 ? work.points[0].join(' ') : undefined;
  if (work.kind !== 'planting' || work.area.shape !== 'disc') return undefined;
  return `${work.area.x} ${work.area.y}`;
}

/** The ids with those that belong to them: what is planted right on a mound goes with it, and the other way round. */
export function withPartners(ids: Iterable<string>, works: readonly Work[]): Set<string> {
  const chosen = new Set(ids);
  if (chosen.size === 0) return chosen;
  const places = new Set<string>();
  const mounds = new Set<string>();
  for (const work of works) {
    const place = placeKey(work);
    if (place === undefined) continue;
    if (chosen.has(work.id)) places.add(place);
    if (work.kind === 'mound') mounds.add(place);
  }
  for (const work of works) {
    const place = placeKey(work);
    if (place !== undefined && places.has(place) && mounds.has(place)) chosen.add(work.id);
  }
  return chosen;
}

/** The works without what is planted on one of their mounds: what is counted, found and named as one. */
export function withoutPlanted(works: readonly Work[]): Work[] {
  const mounds = new Set(works.filter((work) => work.kind === 'mound').map(placeKey));
  return works.filter((work) => work.kind === 'mound' || !mounds.has(placeKey(work) ?? ''));
}
