import type { LayerSource } from '#sim-core/spec/layer-source.ts';
import { formatCounted, formatNumber } from '#contract/formats.ts';

/**
 * Where one layer of the ground comes from, in words.
 * @param nameOf what the raster of a hash is called
 */
export function sourceInWords(source: LayerSource, nameOf: (hash: string) => string): string {
  if (typeof source === 'number') return `${formatNumber(source)} everywhere`;
  if ('product' in source)
    return `the product of ${source.product.map((part) => sourceInWords(part, nameOf)).join(' and ')}`;
  if ('highest' in source)
    return `the highest of ${source.highest.map((part) => sourceInWords(part, nameOf)).join(' and ')}`;
  if ('mounds' in source) return formatCounted(source.mounds.length, 'surveyed mound');
  if ('areas' in source) return formatCounted(source.areas.length, 'surveyed area');
  const name = 'layer' in source ? nameOf(source.layer) : source.file;
  const read =
    source.classes !== undefined
      ? ` by a table of ${formatCounted(Object.keys(source.classes).length, 'class', 'classes')}`
      : source.curve !== undefined
        ? ` by a curve of ${formatCounted(source.curve.length, 'point')}`
        : '';
  return `${name}${read}`;
}
