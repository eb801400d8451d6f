import { placesIn, type LayerSources, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { formatCounted } from '#app/lib/formats.ts';
import type { MapArea } from '#app/map/map-areas.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import { discRing } from '#app/map/rings.ts';

type Surveyed = Pick<LayerSources, 'refuge' | 'fence'>;

/** Surveyed refuges and fences that a run stood on, beside its rasters, in words; empty where there are none. */
export function surveyedInWords({ refuge, fence }: Surveyed): string[] {
  const { mounds, areas } = placesIn(refuge);
  return [
    mounds.length > 0 && `${formatCounted(mounds.length, 'surveyed refuge')} around points`,
    areas.length > 0 && `${formatCounted(areas.length, 'surveyed refuge')} as areas`,
    placesIn(fence).areas.length > 0 && `${formatCounted(placesIn(fence).areas.length, 'surveyed fence')}`,
  ].filter((words) => words !== false);
}

/** The same as the map draws them: refuges around points as diamonds, all else as outlines. */
export function surveyedOnMap({ refuge, fence }: RunSpec['layers']): {
  footholds: MapFoothold[];
  areas: MapArea[];
} {
  const { mounds, areas } = placesIn(refuge);
  const outlines = [
    ...areas.map(({ area }) => ({ kind: 'refuge' as const, area })),
    ...placesIn(fence).areas.map(({ area }) => ({ kind: 'fence' as const, area })),
  ];
  return {
    footholds: mounds.map(({ x, y, radius, halo }, i) => ({
      id: `surveyed mound ${i + 1}`,
      x,
      y,
      kind: 'surveyed',
      radius: radius + halo,
    })),
    areas: outlines.map(({ kind, area }, i) => ({
      id: `surveyed area ${i + 1}`,
      kind,
      ...(area.shape === 'disc'
        ? { ring: discRing(area.x, area.y, area.radius) }
        : { ring: area.ring, holes: area.holes }),
    })),
  };
}
