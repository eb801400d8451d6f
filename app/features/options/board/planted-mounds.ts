import type { Work } from '#contract/works.ts';
import type { PenMound } from '../mound-pen.ts';

/** A mound and the clumps set on it are two works that belong together: the clumps have the mound's id with this end. */
const planted = '-p';

/** A mound at a place, and the clumps that are set on it, if any: nothing grows from a bare mound by itself. */
export function plantedMound(
  id: string,
  { clumps, ...mound }: PenMound,
  at: { x: number; y: number; year: number; set?: string },
): Work[] {
  const { x, y, year, set } = at;
  const works: Work[] = [{ kind: 'mound', id, set, year, x, y, ...mound }];
  if (clumps > 0) works.push({ kind: 'clumps', id: id + planted, set, year, points: [[x, y]], each: clumps });
  return works;
}

/** The id of the mound that clumps are set on, or of the clumps of a mound; it need not be there. */
export const partnerOf = (id: string): string =>
  id.endsWith(planted) ? id.slice(0, -planted.length) : id + planted;

/** The ids with those of the works that belong to them. */
export function withPartners(ids: Iterable<string>, works: readonly Work[]): Set<string> {
  const chosen = new Set(ids);
  if (chosen.size === 0) return chosen;
  const there = new Set(works.map((work) => work.id));
  for (const id of [...chosen]) {
    const partner = partnerOf(id);
    if (there.has(partner)) chosen.add(partner);
  }
  return chosen;
}

/** The works without the clumps that belong to one of their mounds: what is counted, found and named as one. */
export function withoutPlanted(works: readonly Work[]): Work[] {
  const there = new Set(works.map((work) => work.id));
  return works.filter(({ id }) => !id.endsWith(planted) || !there.has(partnerOf(id)));
}

/** New ids for copies, so that those that belong together still do. */
export function copyIds(works: readonly Work[], newId: () => string): Map<string, string> {
  const ids = new Map<string, string>();
  const there = new Set(works.map((work) => work.id));
  for (const { id } of works) if (!id.endsWith(planted) || !there.has(partnerOf(id))) ids.set(id, newId());
  for (const { id } of works) if (!ids.has(id)) ids.set(id, ids.get(partnerOf(id)) + planted);
  return ids;
}
