import type { Feature } from '#contract/features.ts';
import type { MapArea } from '#app/map/map-areas.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import { discRing } from '#app/map/rings.ts';

/** Surveyed points and areas as the map draws them: refuges that are points as diamonds, all else as outlines. */
export function placesOnMap(features: readonly Feature[]): {
  footholds: MapFoothold[];
  areas: MapArea[];
} {
  const footholds: MapFoothold[] = [];
  const areas: MapArea[] = [];
  for (const { id, kind, shape, halo } of features) {
    if (shape.shape === 'polygon') areas.push({ id, kind, ring: shape.ring, holes: shape.holes });
    else if (kind === 'refuge')
      footholds.push({
        id,
        x: shape.x,
        y: shape.y,
        kind: 'surveyed',
        radius: shape.radius + halo,
      });
    else areas.push({ id, kind, ring: discRing(shape.x, shape.y, shape.radius) });
  }
  return { footholds, areas };
}
