import { valueUnitScale, type HabitatClass, type Layer } from '#contract/sites.ts';
import type { ShareMapping } from '#sim-core/grid/ground.ts';

/** How the cells of `habitat` become capacity; what no class gives a capacity cannot grow. */
export const capacityMapping = (
  layer: Pick<Layer, 'noData'>,
  classes: readonly HabitatClass[],
): ShareMapping => ({
  classes: Object.fromEntries(classes.map((row) => [row.value, row.capacity])),
  noData: layer.noData,
});

/** How the cells of `cover` or `refuge` become shares; no data counts as none. */
export const unitMapping = (layer: Pick<Layer, 'noData' | 'unit'>): ShareMapping => ({
  scale: valueUnitScale[layer.unit],
  noData: layer.noData,
});

/** Ground that can hold the plant, m², from the class counts alone; `classes` may be unsaved. */
export function plantableArea(
  layer: Pick<Layer, 'classCounts'>,
  classes: readonly HabitatClass[],
  cellSize: number,
): number {
  const growing = new Set(classes.filter((row) => row.capacity > 0).map((row) => row.value));
  const cells = (layer.classCounts ?? []).reduce(
    (sum, { value, cells }) => (growing.has(value) ? sum + cells : sum),
    0,
  );
  return cells * cellSize * cellSize;
}

/** Area with any refuge, m². */
export function refugeArea(refuge: Uint8Array, cellSize: number): number {
  let cells = 0;
  for (let i = 0; i < refuge.length; i++) if (refuge[i] > 0) cells++;
  return cells * cellSize * cellSize;
}
