import type { LayerSource } from '#sim-core/spec/run-spec.ts';
import { valueUnitScale, type Layer, type LayerPart } from './layers.ts';
import { type Site } from './sites.ts';

/** The layer that plays a part on a site. */
export const layerOf = (site: Pick<Site, 'layers'>, part: LayerPart): Layer | undefined =>
  site.layers.find((layer) => layer.part === part);

/**
 * What a site's layers are to the engine: capacity and vigour from the classes of `habitat`, cover and refuge by the
 * scale of their unit, each raster named by its hash. A layer that the site lacks is left out, but for cover, which no
 * run can be without: there, nothing stands.
 */
export function layerSources(site: Pick<Site, 'layers'>) {
  const habitat = layerOf(site, 'habitat');
  const ofClass = (of: 'capacity' | 'vigour'): LayerSource =>
    habitat?.classes
      ? {
          layer: habitat.hash,
          classes: Object.fromEntries(habitat.classes.map((row) => [String(row.value), row[of]])),
        }
      : 1;
  const shares = (part: LayerPart): LayerSource => {
    const layer = layerOf(site, part);
    return layer ? { layer: layer.hash, scale: valueUnitScale[layer.unit] } : 0;
  };
  return {
    capacity: ofClass('capacity'),
    vigour: ofClass('vigour'),
    exposure: 0,
    refuge: shares('refuge'),
    fence: 0,
    cover: shares('cover'),
  };
}
