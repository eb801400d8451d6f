import { heightUnitScale, type Layer, type TidalDatum } from '#contract/layers.ts';
import type { ElevationCurves } from '#contract/layers.ts';

/** Heights of the site in metres above its vertical datum. */
export interface SiteHeights {
  readonly minimum: number;
  readonly maximum: number;
  /** counts in equal bins from minimum to maximum */
  readonly histogram: readonly number[];
}

/** What was found in the elevation layer, in metres. */
export function siteHeights(
  layer: Pick<Layer, 'minimum' | 'maximum' | 'histogram' | 'vertical'>,
): SiteHeights {
  const scale = heightUnitScale[layer.vertical?.unit ?? 'metre'];
  return { minimum: layer.minimum * scale, maximum: layer.maximum * scale, histogram: layer.histogram };
}

/** The height below which a share of the cells lies, read off the bins. */
export function heightAt({ minimum, maximum, histogram }: SiteHeights, share: number): number {
  const all = histogram.reduce((sum, count) => sum + count, 0);
  const bin = (maximum - minimum) / Math.max(1, histogram.length);
  let below = 0;
  for (const [i, count] of histogram.entries()) {
    if (count > 0 && below + count >= share * all) return minimum + bin * (i + (share * all - below) / count);
    below += count;
  }
  return maximum;
}

/** From and to of a chart that shows the site's heights, every point of the curves and every level of the tide. */
export function chartSpan(
  heights: SiteHeights,
  curves: ElevationCurves,
  datums: readonly TidalDatum[],
): { from: number; to: number } {
  const shown = [
    heights.minimum,
    heights.maximum,
    ...Object.values(curves).flatMap((curve) => (curve ?? []).map(([height]) => height)),
    ...datums.map(({ height }) => height),
  ];
  const least = shown.reduce((a, b) => Math.min(a, b));
  const most = shown.reduce((a, b) => Math.max(a, b));
  const margin = Math.max(0.05, (most - least) * 0.06);
  return { from: least - margin, to: most + margin };
}
