import type { HabitatClass, Layer } from '#contract/layers.ts';

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
