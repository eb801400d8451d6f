import { placeKey } from '#contract/work-titles.ts';
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
