import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Layer, LayerPart, Site } from '#contract/sites.ts';
import { toBytes, type CellValues } from '#sim-core/grid/ground.ts';
import { capacityBytes, coveredArea, layerShares, refugeArea } from './ground-facts.ts';
import { layerValuesQuery } from './layer-values.ts';

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

/** Cells of the site's layers as the map and the engine take them. */
export function useGroundRasters(site: Site): GroundRasters {
  const { id, layers, grid } = site;
  const layerOf = (part: LayerPart) => layers.find((layer) => layer.part === part);
  const [habitat, cover, refuge] = [layerOf('habitat'), layerOf('cover'), layerOf('refuge')];
  const values = {
    habitat: useValues(id, habitat),
    cover: useValues(id, cover),
    refuge: useValues(id, refuge),
  };
  const habitatCells = values.habitat.data?.values;
  const coverShares = useShares(cover, values.cover.data?.values);
  const refugeShares = useShares(refuge, values.refuge.data?.values);
  const { noData = null, classes = null } = habitat ?? {};
  const capacity = useMemo(
    () => (habitatCells && classes ? capacityBytes({ noData }, habitatCells, classes) : undefined),
    [habitatCells, noData, classes],
  );
  // With a class table on its way the area would jump once it is there.
  const settled = classes === null || capacity !== undefined;
  const covered = useMemo(
    () =>
      coverShares.shares && settled ? coveredArea(coverShares.shares, capacity, grid.cellSize) : undefined,
    [coverShares.shares, capacity, settled, grid.cellSize],
  );
  const sheltered = useMemo(
    () => refugeShares.bytes && refugeArea(refugeShares.bytes, grid.cellSize),
    [refugeShares.bytes, grid.cellSize],
  );
  return {
    habitat: habitatCells,
    cover: coverShares.bytes,
    refuge: refugeShares.bytes,
    capacity,
    covered,
    sheltered,
    errors: {
      habitat: values.habitat.error ?? undefined,
      cover: values.cover.error ?? coverShares.error,
      refuge: values.refuge.error ?? refugeShares.error,
    },
    retry: (part) => void values[part].refetch(),
  };
}

const useValues = (siteId: string, layer: Layer | undefined) =>
  useQuery({ ...layerValuesQuery(siteId, layer?.hash ?? ''), enabled: layer !== undefined });

function useShares(layer: Layer | undefined, cells: CellValues | undefined) {
  const { unit = 'share', noData = null } = layer ?? {};
  return useMemo((): { shares?: Float32Array; bytes?: Uint8Array; error?: unknown } => {
    if (!cells) return {};
    try {
      const shares = layerShares({ unit, noData }, cells);
      return { shares, bytes: toBytes(shares) };
    } catch (error) {
      return { error };
    }
  }, [cells, unit, noData]);
}
