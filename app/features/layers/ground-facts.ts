import { valueUnitScale, type HabitatClass, type Layer } from '#contract/sites.ts';
import { toBytes, toShares, type CellValues } from '#sim-core/grid/ground.ts';

/** Capacity of every cell in 8 bits; what no class gives a capacity cannot grow. */
export function capacityBytes(
  layer: Pick<Layer, 'noData'>,
  values: CellValues,
  classes: readonly HabitatClass[],
): Uint8Array {
  const table = Object.fromEntries(classes.map((row) => [row.value, row.capacity]));
  return toBytes(toShares(values, { classes: table, noData: layer.noData }));
}

/** Shares of `cover` or `refuge`, Float32; no data counts as none. @throws ShareError where a value is no share */
export const layerShares = (layer: Pick<Layer, 'noData' | 'unit'>, values: CellValues): Float32Array =>
  toShares(values, { scale: valueUnitScale[layer.unit], noData: layer.noData });

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

/** Area that stands now, m²: cover, never above the capacity where that is known, as the engine takes it. */
export function coveredArea(cover: Float32Array, capacity: Uint8Array | undefined, cellSize: number): number {
  let sum = 0;
  for (let i = 0; i < cover.length; i++)
    sum += capacity === undefined ? cover[i] : Math.min(cover[i], capacity[i] / 255);
  return sum * cellSize * cellSize;
}

/** Area with any refuge, m². */
export function refugeArea(refuge: Uint8Array, cellSize: number): number {
  let cells = 0;
  for (let i = 0; i < refuge.length; i++) if (refuge[i] > 0) cells++;
  return cells * cellSize * cellSize;
}
