import type { Work, WorkSet } from '#contract/works.ts';
import type { Pattern } from '#sim-core/plan/pattern.ts';
import type { GroundPoint } from '#app/map/rings.ts';
import type { PenMound } from '../mound-pen.ts';
import { isClumpPattern, type PatternTool } from './board-tools.ts';
import { penParameters, type PatternPen } from './pattern-pen.ts';
import { plantedMound } from './planted-mounds.ts';

export interface LaidSetting {
  readonly tool: PatternTool;
  readonly pen: PatternPen;
  readonly pattern: Pattern;
  readonly seed: string;
  /** outline or line that was drawn; undefined: the whole site */
  readonly outline: readonly GroundPoint[] | undefined;
  readonly mound: PenMound;
  readonly year: number;
}

const toCentimetre = (metres: number) => Math.round(metres * 100) / 100;

/**
 * The works of laid points: a mound at each, or one planting with a clump at each. All are of one set, which says how
 * they were laid, so that they can be laid anew.
 *
 * @param newId gives ids, the set's first
 */
export function laidWorks(
  points: readonly GroundPoint[],
  setting: LaidSetting,
  newId: () => string,
): { works: Work[]; set: WorkSet } {
  const { tool, pen, pattern, seed, outline, mound, year } = setting;
  const id = newId();
  const set: WorkSet = {
    id,
    laid: {
      pattern: pattern.kind,
      seed,
      ...(outline && { outline: outline.map(([x, y]) => [x, y]) }),
      parameters: penParameters(tool, pen),
    },
  };
  const places = points.map(([x, y]): [number, number] => [toCentimetre(x), toCentimetre(y)]);
  const works: Work[] = isClumpPattern(tool)
    ? [{ kind: 'clumps', id: newId(), set: id, year, points: places, each: 1 }]
    : places.flatMap(([x, y]) => plantedMound(newId, mound, { x, y, year, set: id }));
  return { works: places.length > 0 ? works : [], set };
}
