import type { Work } from '#contract/works.ts';
import type { MapArea } from '#app/map/map-areas.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import { discRing, type Ring } from '#app/map/rings.ts';
import type { Area } from '#sim-core/spec/run-spec.ts';

/** Works as the map draws them: a flag for a mound, a dot for a clump, an outline for what takes up ground. */
export interface DrawnWorks {
  readonly footholds: MapFoothold[];
  readonly areas: MapArea[];
}

/** Not there yet, or no longer, in the year that the map shows. */
export const isFaint = (work: Work, year: number): boolean =>
  work.year > year || (work.kind === 'fence' && work.until !== undefined && work.until < year);

export const ringOf = (area: Area): Ring =>
  area.shape === 'disc' ? discRing(area.x, area.y, area.radius) : area.ring;

const looks = { there: new WeakMap<Work, DrawnWorks>(), faint: new WeakMap<Work, DrawnWorks>() };

/** One of the works as it is drawn, made once for each of them: of thousands, few change at a time. */
function workOnMap(work: Work, faint: boolean): DrawnWorks {
  const known = looks[faint ? 'faint' : 'there'];
  const found = known.get(work);
  if (found) return found;
  const look = { id: work.id, year: work.year, faint };
  const drawn: DrawnWorks = { footholds: [], areas: [] };
  if (work.kind === 'mound')
    drawn.footholds.push({ ...look, x: work.x, y: work.y, kind: 'planned', radius: work.radius + work.halo });
  else if (work.kind === 'clumps')
    for (const [x, y] of work.points) drawn.footholds.push({ ...look, x, y, kind: 'clump' });
  else
    drawn.areas.push({
      ...look,
      kind: work.kind,
      ring: ringOf(work.area),
      ...(work.area.shape === 'polygon' && work.area.holes && { holes: work.area.holes }),
    });
  known.set(work, drawn);
  return drawn;
}

/** What is to be drawn for works in a year; `faint` draws all of them faint, as works that are not placed yet. */
export function worksOnMap(works: readonly Work[], year: number, faint = false): DrawnWorks {
  const footholds: MapFoothold[] = [];
  const areas: MapArea[] = [];
  for (const work of works) {
    const drawn = workOnMap(work, faint || isFaint(work, year));
    for (const foothold of drawn.footholds) footholds.push(foothold);
    for (const area of drawn.areas) areas.push(area);
  }
  return { footholds, areas };
}
