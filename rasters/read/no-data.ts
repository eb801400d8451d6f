import { arrayTypes } from './raster.ts';
import type { RasterDataType } from './tiff-layout.ts';

/** The no-data value of GDAL's tag (42113) as the data type holds it, or null where there is none or no cell can have it. */
export function parseNoData(text: string | undefined, dataType: RasterDataType): number | null {
  const said = text?.trim();
  if (!said) return null;
  const value = Number(said);
  if (Number.isNaN(value)) return null;
  const held = arrayTypes[dataType].of(value)[0];
  return Number.isFinite(held) && (held === value || dataType === 'float32') ? held : null;
}
