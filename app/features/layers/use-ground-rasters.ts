import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Layer, LayerPart, Site } from '#contract/sites.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';
import { capacityMapping, refugeArea, unitMapping } from './ground-facts.ts';
import { layerValuesQuery, shareBytesQuery, sumSharesQuery } from './layer-values.ts';

export interface GroundRasters {
  /** undefined while on its way or where there is no such layer */
  habitat: CellValues | undefined;
  cover: Uint8Array | undefined;
  refuge: Uint8Array | undefined;
  /** capacity by the saved class table */
  capacity: Uint8Array | undefined;
  /** m²; undefined while not known */
  covered: number | undefined;
  sheltered: number | undefined;
  /** what went wrong on the way, by part */
  errors: Partial<Record<LayerPart, unknown>>;
  retry: (part: LayerPart) => void;
}

/** Cells of the site's layers as the map takes them. */
export function useGroundRasters(site: Site): GroundRasters {
  const { id, layers, grid } = site;
  const layerOf = (part: LayerPart) => layers.find((layer) => layer.part === part);
  const [habitat, cover, refuge] = [layerOf('habitat'), layerOf('cover'), layerOf('refuge')];
  const classes = useQuery({
    ...layerValuesQuery(id, habitat?.hash ?? ''),
    enabled: habitat !== undefined,
  });
  const ceiling = habitat?.classes
    ? { hash: habitat.hash, mapping: capacityMapping(habitat, habitat.classes) }
    : undefined;
  const capacity = useQuery({
    ...shareBytesQuery(id, ceiling?.hash ?? '', ceiling?.mapping ?? {}),
    enabled: ceiling !== undefined,
  });
  const shares = { cover: useShares(id, cover), refuge: useShares(id, refuge) };
  const covered = useQuery({
    ...sumSharesQuery(id, cover?.hash ?? '', cover ? unitMapping(cover) : {}, ceiling),
    enabled: cover !== undefined,
  }).data;
  const refugeBytes = shares.refuge.data;
  const sheltered = useMemo(
    () => refugeBytes && refugeArea(refugeBytes, grid.cellSize),
    [refugeBytes, grid.cellSize],
  );
  return {
    habitat: classes.data?.values,
    cover: shares.cover.data,
    refuge: refugeBytes,
    capacity: capacity.data,
    covered: covered === undefined ? undefined : covered * grid.cellSize ** 2,
    sheltered,
    errors: {
      habitat: classes.error ?? capacity.error ?? undefined,
      cover: shares.cover.error ?? undefined,
      refuge: shares.refuge.error ?? undefined,
    },
    retry: (part) => {
      if (part !== 'habitat') return void shares[part].refetch();
      void classes.refetch();
      if (ceiling) void capacity.refetch();
    },
  };
}

const useShares = (siteId: string, layer: Layer | undefined) =>
  useQuery({
    ...shareBytesQuery(siteId, layer?.hash ?? '', layer ? unitMapping(layer) : {}),
    enabled: layer !== undefined,
  });
