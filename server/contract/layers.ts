import { z } from 'zod';
import { id, instant, sha256, text } from './endpoint.ts';
import { gridSchema } from './grid.ts';

/** The parts that a layer can play. All but `resurvey` are played by one layer at a time; of it there is one a year. */
export const layerParts = [
  'habitat',
  'cover',
  'resurvey',
  'refuge',
  'elevation',
  'exposure',
  'allowed',
] as const;
export const layerPartSchema = z.enum(layerParts);
export type LayerPart = z.infer<typeof layerPartSchema>;

/** Year of a survey. */
export const layerYearSchema = z
  .number('A year such as 2030')
  .int('A whole year')
  .min(1000, 'A year of four digits')
  .max(9999, 'A year of four digits');

const colour = z.string().regex(/^#[0-9a-f]{6}$/i, 'a colour such as #5b825a');
export const shareSchema = z
  .number('A share between 0 and 1')
  .min(0, 'A share between 0 and 1')
  .max(1, 'A share between 0 and 1');

/** One row of the class table of `habitat`. */
export const habitatClassSchema = z.strictObject({
  value: z.number().int(),
  name: text(80),
  colour,
  capacity: shareSchema,
  vigour: shareSchema,
});
export type HabitatClass = z.infer<typeof habitatClassSchema>;
export const habitatClassesSchema = z
  .array(habitatClassSchema)
  .min(1)
  .max(256)
  .refine(
    (rows) => new Set(rows.map((r) => r.value)).size === rows.length,
    'Each class may stand in the table once',
  );

/**
 * What the values of `cover`, `resurvey`, `exposure`, `refuge` and `allowed` are: shares 0..1, per cent, 8 bits, or present / absent.
 * It means nothing for `habitat` (classes) and `elevation` (heights).
 */
export const valueUnits = ['share', 'percent', 'byte', 'presence'] as const;
export const valueUnitSchema = z.enum(valueUnits);
export type ValueUnit = z.infer<typeof valueUnitSchema>;
/** share = value × scale */
export const valueUnitScale: Record<ValueUnit, number> = {
  share: 1,
  percent: 0.01,
  byte: 1 / 255,
  presence: 1,
};

/** Units of heights. */
export const heightUnits = ['metre', 'foot', 'us-foot'] as const;
export const heightUnitSchema = z.enum(heightUnits);
export type HeightUnit = z.infer<typeof heightUnitSchema>;
/**
 * metres = value × scale. The international foot is 0.3048 m by the agreement of 1959, the US survey foot 1200/3937 m by
 * the Mendenhall order of 1893; both exact.
 */
export const heightUnitScale: Record<HeightUnit, number> = {
  metre: 1,
  foot: 0.3048,
  'us-foot': 1200 / 3937,
};
/** What the values of `elevation` are heights in, and above what. */
export const verticalSchema = z.strictObject({
  /** the vertical datum as people name it; empty while nobody has said */
  datum: z.string().trim().max(100),
  unit: heightUnitSchema,
});
export type Vertical = z.infer<typeof verticalSchema>;

export const dataTypeSchema = z.enum([
  'uint8',
  'int8',
  'uint16',
  'int16',
  'uint32',
  'int32',
  'float32',
  'float64',
]);

/** What was found in the cells of a raster. */
export const layerFactsSchema = z.object({
  dataType: dataTypeSchema,
  crsName: z.string(),
  noData: z.number().nullable(),
  /** share of the cells without data */
  noDataShare: z.number(),
  minimum: z.number(),
  maximum: z.number(),
  /** counts in equal bins from minimum to maximum */
  histogram: z.array(z.number().int()),
  /** the class values found, ascending, with the cells of each; only where there are at most 256 */
  classCounts: z.array(z.object({ value: z.number(), cells: z.number().int() })).nullable(),
});
export type LayerFacts = z.infer<typeof layerFactsSchema>;

/**
 * How a value of the working grid is taken from those of the file: its own cells one to one (`copy`), the value at the
 * centre, between the four centres around it, the mean by area of all below it, or the class with most area below it.
 */
export const resamplingMethods = ['copy', 'nearest', 'bilinear', 'area-weighted', 'majority'] as const;
export const resamplingMethodSchema = z.enum(resamplingMethods);
export type ResamplingMethod = z.infer<typeof resamplingMethodSchema>;

/** What the file is that a layer was made from, and which of its bands. */
export const storedSourceSchema = z.object({
  crsName: z.string(),
  epsg: z.number().int(),
  width: z.number().int(),
  height: z.number().int(),
  /** sides of a cell in the unit of the CRS */
  cellWidth: z.number(),
  cellHeight: z.number(),
  /** which band plays the part, from 1, and how many there are */
  band: z.number().int(),
  bands: z.number().int(),
  /** value = stored number × scale + offset, as the file says */
  scale: z.number(),
  offset: z.number(),
});
export type StoredSource = z.infer<typeof storedSourceSchema>;

/** The file that a layer was made from, as it came. */
export const layerSourceFileSchema = storedSourceSchema.extend({
  fileName: z.string(),
  hash: sha256,
  bytes: z.number().int(),
  uploadedAt: instant,
  uploadedBy: z.string(),
});

/** What was done to bring the file onto the working grid. */
export const alignmentSchema = z.object({
  /** `copy` without crop, pad or scaling is the file untouched */
  method: resamplingMethodSchema,
  /** name of the CRS that it was reprojected from; null where it had the grid's */
  reprojectedFrom: z.string().nullable(),
  /** cells of the file outside the grid, which were left out */
  cropped: z.number().int(),
  /** cells of the grid that the file does not reach; they have no data */
  padded: z.number().int(),
});
export type Alignment = z.infer<typeof alignmentSchema>;

export const layerSchema = layerFactsSchema.extend({
  id,
  part: layerPartSchema,
  /** year that a `resurvey` was flown or mapped in; null of any other part */
  year: layerYearSchema.nullable(),
  /** SHA-256 of the raster on the working grid, which runs name: the file itself where nothing had to be changed */
  hash: sha256,
  /** size of that raster, bytes */
  bytes: z.number().int(),
  /** the cells that it lies on: those of the site, or of an earlier grid of it */
  grid: gridSchema,
  source: layerSourceFileSchema,
  alignment: alignmentSchema,
  /** what people should know about it; may be empty */
  note: z.string(),
  unit: valueUnitSchema,
  /** null but for `elevation` */
  vertical: verticalSchema.nullable(),
  /** null until somebody has set them; always null but for `habitat` */
  classes: habitatClassesSchema.nullable(),
});
export type Layer = z.infer<typeof layerSchema>;

/** A layer that plays its part now, or did. */
export const layerHistoryEntrySchema = z.object({
  layer: layerSchema,
  /** when it was replaced or taken off; null for the one that stands */
  replacedAt: instant.nullable(),
  /** how many runs stand on it */
  runs: z.number().int(),
});
export type LayerHistoryEntry = z.infer<typeof layerHistoryEntrySchema>;

/** Height in metres above the vertical datum of `elevation` → share; straight lines between, level beyond the ends. */
export const elevationCurveSchema = z
  .array(z.tuple([z.number().min(-12_000).max(9_000), shareSchema]))
  .min(2, 'At least 2 points')
  .max(20, 'At most 20 points')
  .refine(
    (points) => points.every(([height], i) => i === 0 || height > points[i - 1][0]),
    'Each point must stand higher than the one before',
  );
export type ElevationCurve = z.infer<typeof elevationCurveSchema>;

/** What elevation does: a curve each, null where it does nothing. */
export const elevationCurvesSchema = z.strictObject({
  capacity: elevationCurveSchema.nullable(),
  vigour: elevationCurveSchema.nullable(),
  exposure: elevationCurveSchema.nullable(),
});
export type ElevationCurves = z.infer<typeof elevationCurvesSchema>;

/** A named level of the tide as a guide for the eye, such as mean sea level; the engine does not read it. */
export const tidalDatumSchema = z.strictObject({
  name: text(60),
  /** m above the vertical datum of `elevation` */
  height: z.number().min(-100).max(100),
});
export type TidalDatum = z.infer<typeof tidalDatumSchema>;
export const tidalDatumsSchema = z.array(tidalDatumSchema).max(12, 'At most 12 levels');
