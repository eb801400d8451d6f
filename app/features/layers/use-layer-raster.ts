import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { allowedSource, layerOf } from '#contract/layer-sources.ts';
import {
  heightUnitScale,
  valueUnitScale,
  type HabitatClass,
  type Layer,
  type LayerPart,
} from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import type { LayerSource } from '#sim-core/spec/run-spec.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import { siteOrigin, sourceBytesQuery } from './engine-ground.ts';
import { layerValuesQuery } from './layer-values.ts';
import { partLabels } from './part-words.ts';

export interface LayerRaster {
  /** undefined while on its way */
  raster: MapRaster | undefined;
  /** null while nothing went wrong */
  error: Error | null;
  retry: () => void;
}

/**
 * A layer of a site as it stands, before the engine makes anything of it; where works may go, with the areas that allow
 * them.
 */
export function useLayerRaster(
  site: Site,
  part: LayerPart | undefined,
  classes: readonly HabitatClass[],
  /** of a resurvey */
  year?: number,
): LayerRaster {
  const layer = part && layerOf(site, part, year);
  const source = part === 'allowed' ? allowedSource(site) : layer && sourceOf(layer);
  const isHabitat = part === 'habitat';
  const values = useQuery({
    ...layerValuesQuery(site.id, layer?.hash ?? ''),
    enabled: layer !== undefined && isHabitat,
  });
  const bytes = useQuery({
    ...sourceBytesQuery(siteOrigin(site), source ?? 0),
    enabled: source !== undefined && !isHabitat,
  });
  const cells = values.data?.values;
  const shares = source === undefined ? undefined : bytes.data;
  const raster = useMemo((): MapRaster | undefined => {
    if (part === 'habitat')
      return cells && { kind: 'classes', values: cells, classes, noData: layer?.noData };
    if (!part || !shares) return undefined;
    if (part === 'cover' || part === 'resurvey') return { kind: 'cover', values: shares };
    if (part === 'elevation' && layer) return { kind: 'height', values: shares, ...heightsOf(layer) };
    return { kind: 'share', values: shares, name: partLabels[part].toLowerCase() };
  }, [part, layer, cells, shares, classes]);
  const asked = isHabitat ? values : bytes;
  return { raster, error: asked.error, retry: () => void asked.refetch() };
}

/** Lowest and highest of an elevation layer, m. */
export function heightsOf({ minimum, maximum, vertical }: Layer): { lowest: number; highest: number } {
  const scale = heightUnitScale[vertical?.unit ?? 'metre'];
  return { lowest: minimum * scale, highest: maximum * scale };
}

/** Shares as they are; heights in 255 steps, no data as 0. */
function sourceOf(layer: Layer): LayerSource {
  if (layer.part !== 'elevation') return { layer: layer.hash, scale: valueUnitScale[layer.unit] };
  const { minimum, maximum } = layer;
  return {
    layer: layer.hash,
    curve: [
      [minimum, 1 / 255],
      [maximum > minimum ? maximum : minimum + 1, 1],
    ],
  };
}
