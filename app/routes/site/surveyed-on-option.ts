import type { Feature } from '#contract/features.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { surveyedMounds } from '#app/features/options/surveyed-mounds.ts';
import { placesOnMap } from '#app/features/site-features/places-on-map.ts';
import { formatCounted } from '#app/lib/formats.ts';
import type { MapArea } from '#app/map/map-areas.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';

/** What was surveyed and shelters or keeps grazers out, as an option's map draws it beside the works. */
export interface SurveyedOnOption {
  /** refuges that are points, and the strong patches of the refuge raster */
  readonly footholds: readonly MapFoothold[];
  /** outlines of refuges and fences that are areas */
  readonly areas: readonly MapArea[];
}

/**
 * Points and areas come from what was surveyed, never from the raster that the engine makes of them: there a polygon
 * and the points beside it run into one patch, and its middle may lie in a hole.
 *
 * @param refuge the refuge layer by itself, strength in 8 bits a cell; undefined where there is none
 */
export function surveyedOnOption(
  features: readonly Feature[],
  grid: Grid,
  refuge: Uint8Array | undefined,
): SurveyedOnOption {
  const { footholds, areas } = placesOnMap(features.filter(({ kind }) => kind !== 'allowed'));
  const patches = refuge
    ? surveyedMounds(grid, refuge).map(({ x, y }, i) => ({ id: `s${i}`, x, y, kind: 'surveyed' as const }))
    : [];
  return {
    footholds: [...footholds, ...patches].map((foothold) => ({ ...foothold, name: 'Surveyed mound' })),
    areas,
  };
}

/** The same in words: `4 surveyed mounds, 1 surveyed refuge area`; empty where there is nothing. */
export function surveyedOnOptionInWords({ footholds, areas }: SurveyedOnOption): string {
  const of = (kind: MapArea['kind']) => areas.filter((area) => area.kind === kind).length;
  return [
    footholds.length > 0 && formatCounted(footholds.length, 'surveyed mound'),
    of('refuge') > 0 && formatCounted(of('refuge'), 'surveyed refuge area'),
    of('fence') > 0 && formatCounted(of('fence'), 'surveyed fence'),
  ]
    .filter((words) => words !== false)
    .join(', ');
}
