import type { HeightUnitFound } from './height-unit.ts';
import type { CompressionName, RasterDataType } from '#rasters/read/tiff-layout.ts';

/** What a CRS is called and how long its unit is. */
export interface CrsDescription {
  readonly epsg: number;
  /** the name in the EPSG register, else the file's own, else `EPSG:n` */
  readonly name: string;
  readonly kind: 'projected' | 'geographic';
  /** `other` where it is a projected unit that has a length and no common name here, such as a chain */
  readonly unit: 'metre' | 'foot' | 'us-foot' | 'degree' | 'other';
  /** the unit's length in metres; null for degrees */
  readonly metresPerUnit: number | null;
}

/** One band as the file describes it. */
export interface BandDescription {
  /** counted from 1, as GDAL does */
  readonly index: number;
  /** the band's own description, or null */
  readonly name: string | null;
  /** `alpha` says which cells hold data (0 = none) and is no layer of its own */
  readonly role: 'data' | 'alpha';
  readonly dataType: RasterDataType;
  /** the stored value that means no data, as the data type holds it; NaN always means it too, and is never named here */
  readonly noData: number | null;
  /** value = stored × scale + offset; 1 and 0 where the file says nothing */
  readonly scale: number;
  readonly offset: number;
  /** unit of the values as the file names it, e.g. `m`, or null */
  readonly unit: string | null;
}

/**
 * What a GeoTIFF holds, known without decoding a cell. Plain data that JSON carries whole.
 * Places are those of the outer corners of cells, whatever the file counts from; rows are thought of as running from
 * north to south, also where the file keeps them the other way round (`southUp`).
 */
export interface RasterDescription {
  readonly width: number;
  readonly height: number;
  readonly bands: readonly BandDescription[];
  readonly crs: CrsDescription;
  /** what the file's vertical system counts heights in; null where it names none that is known */
  readonly heightUnit: HeightUnitFound | null;
  /** outer corner of the north-western cell, in units of the CRS */
  readonly originX: number;
  readonly originY: number;
  /** sides of a cell, both positive, in units of the CRS */
  readonly cellWidth: number;
  readonly cellHeight: number;
  /** sides of a cell, m: in degrees those on the ellipsoid at the raster's centre, as a degree shrinks with latitude */
  readonly cellMetres: { readonly width: number; readonly height: number };
  /** whether lengths in the CRS are those on the ground within 2 % here; never for degrees */
  readonly metresTrue: boolean;
  /** bounding box in degrees on the CRS's own datum; null where the CRS cannot be computed here */
  readonly lonLat: LonLatBox | null;
  /** the first row of the file lies in the south */
  readonly southUp: boolean;
  /** the file counts from cell centres (GTRasterTypeGeoKey 2); the half cell is already taken off the origin */
  readonly pixelIsPoint: boolean;
  readonly compression: CompressionName;
  readonly tiled: boolean;
  readonly bigTiff: boolean;
  /** reduced copies beside the full picture; never used for values */
  readonly overviews: number;
}

export interface LonLatBox {
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
}
