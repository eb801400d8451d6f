import type { RasterContent } from '#rasters/align/alignment-plan.ts';
import type { LayerFacts, LayerPart, ValueUnit } from '#contract/layers.ts';

/** What the values of a part are, which decides how they may be resampled. */
export const contentOf = (part: LayerPart): RasterContent => (part === 'habitat' ? 'classes' : 'amounts');

/** What is wrong with a raster's values for the part it should play. */
export interface ValueComplaint {
  found: string;
  expected: string;
  remedy: string;
}

const largest: Record<ValueUnit, number> = { share: 1, percent: 100, byte: 255, presence: 1 };

/** Whether all values of a raster can be read in a unit; present and absent are whole numbers. */
export function fitsUnit(
  { dataType, minimum, maximum }: Pick<LayerFacts, 'dataType' | 'minimum' | 'maximum'>,
  unit: ValueUnit,
): boolean {
  if (unit === 'presence' && dataType.startsWith('float')) return false;
  return minimum >= 0 && maximum <= largest[unit];
}

/** What forbids that a raster plays a part when its values are read in `unit`, or undefined. */
export function valueComplaint(
  part: LayerPart,
  facts: LayerFacts,
  unit: ValueUnit,
): ValueComplaint | undefined {
  const range = `values from ${facts.minimum} to ${facts.maximum}`;
  if (part === 'habitat') {
    if (facts.classCounts && facts.classCounts.every(({ value }) => Number.isSafeInteger(value)))
      return undefined;
    return {
      found: `${range} that are no classes: fractions, or more than 256 different numbers`,
      expected: 'whole class numbers, at most 256 different ones',
      remedy: 'Upload the classified raster, or choose the part that these values play.',
    };
  }
  // Heights may be any numbers: below zero is common, and their unit and datum are a person's to say.
  if (part === 'elevation') return undefined;
  if (fitsUnit(facts, unit)) return undefined;
  return {
    found: range,
    expected: 'shares: 0 to 1, 0 to 100 per cent, or 0 to 255 in 8 bits',
    remedy:
      facts.minimum < 0
        ? `If ${facts.minimum} stands for missing cells, declare it: gdal_translate -a_nodata ${facts.minimum} IN.tif OUT.tif.`
        : 'Scale the values to shares first, for example with gdal_translate -scale and -ot Float32.',
  };
}
