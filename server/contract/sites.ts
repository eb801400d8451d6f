import { z } from 'zod';
import { maximumYears } from '#sim-core/spec/limits.ts';
import { boundarySchema, ratesSchema, stepsPerYearSchema } from '#sim-core/spec/run-spec.ts';
import { endpoint, id, instant, sha256, text } from './endpoint.ts';

export const gridSchema = z.object({
  width: z.number().int().positive(),
  height: z.number().int().positive(),
  cellSize: z.number().positive(),
  originX: z.number(),
  originY: z.number(),
  epsg: z.number().int(),
});

/** The parts that a layer can play in this version. */
export const layerParts = ['habitat', 'cover', 'refuge'] as const;
export const layerPartSchema = z.enum(layerParts);
export type LayerPart = z.infer<typeof layerPartSchema>;

const colour = z.string().regex(/^#[0-9a-f]{6}$/i, 'a colour such as #5b825a');
const share = z
  .number('A share between 0 and 1')
  .min(0, 'A share between 0 and 1')
  .max(1, 'A share between 0 and 1');

/** One row of the class table of `habitat`. */
export const habitatClassSchema = z.strictObject({
  value: z.number().int(),
  name: text(80),
  colour,
  capacity: share,
  vigour: share,
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

/** What the values of `cover` and `refuge` are: shares 0..1, per cent, 8 bits, or present / absent. */
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

export const layerSchema = z.object({
  id,
  part: layerPartSchema,
  fileName: z.string(),
  /** SHA-256 of the file as uploaded */
  hash: sha256,
  bytes: z.number().int(),
  uploadedAt: instant,
  uploadedBy: z.string(),
  dataType: z.enum(['uint8', 'int8', 'uint16', 'int16', 'uint32', 'int32', 'float32', 'float64']),
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
  unit: valueUnitSchema,
  /** null until somebody has set them; always null but for `habitat` */
  classes: habitatClassesSchema.nullable(),
});
export type Layer = z.infer<typeof layerSchema>;

export const plantSchema = z.strictObject({ name: text(100), rates: ratesSchema });
export type Plant = z.infer<typeof plantSchema>;

export const outlookSchema = z
  .strictObject({
    /** year of the survey; the first simulated year is the next one */
    surveyYear: z.number().int().min(1000).max(9000),
    years: z.number().int().min(1).max(maximumYears),
    stepsPerYear: stepsPerYearSchema,
    boundary: boundarySchema,
    /** one value a year, Palmer scale, from the year after the survey */
    droughtIndex: z.array(z.number().min(-15, 'Between −15 and 15').max(15, 'Between −15 and 15')),
  })
  .refine((o) => o.droughtIndex.length === o.years, {
    path: ['droughtIndex'],
    message: 'One value for each year is expected',
  });
export type Outlook = z.infer<typeof outlookSchema>;

export const siteSummarySchema = z.object({
  id,
  teamId: id,
  name: z.string(),
  invented: z.boolean(),
  createdAt: instant,
  grid: gridSchema,
  parts: z.array(layerPartSchema),
  options: z.number().int(),
  runs: z.number().int(),
});
export type SiteSummary = z.infer<typeof siteSummarySchema>;

export const siteSchema = siteSummarySchema.extend({
  crsName: z.string(),
  layers: z.array(layerSchema),
  plant: plantSchema,
  plantSet: z.boolean(),
  outlook: outlookSchema,
  outlookSet: z.boolean(),
});
export type Site = z.infer<typeof siteSchema>;

const siteParams = z.object({ siteId: id });
const siteName = text(100);

export const listSites = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/sites',
  summary: 'The sites of a team',
  params: z.object({ teamId: id }),
  reply: z.object({ sites: z.array(siteSummarySchema) }),
});
/** Multipart: the text fields below and one `file`. */
export const createSite = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/sites',
  summary: 'Make a site from a GeoTIFF: its CRS, cell size and extent become the working grid',
  params: z.object({ teamId: id }),
  bodyKind: 'form',
  body: z.strictObject({ name: siteName, part: layerPartSchema }),
  reply: siteSchema,
});
export const getSite = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId',
  summary: 'A site with its layers, plant and outlook',
  params: siteParams,
  reply: siteSchema,
});
export const renameSite = endpoint({
  method: 'PATCH',
  path: '/api/sites/:siteId',
  summary: 'Rename a site',
  params: siteParams,
  body: z.strictObject({ name: siteName }),
  reply: siteSchema,
});
export const deleteSite = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId',
  summary: 'Delete a site with all that belongs to it',
  params: siteParams,
});
/** Multipart: the text field below and one `file`. A layer of the same part is replaced; runs keep the old one. */
export const uploadLayer = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/layers',
  summary: 'Add or replace a layer',
  params: siteParams,
  bodyKind: 'form',
  body: z.strictObject({ part: layerPartSchema }),
  reply: siteSchema,
});
const layerParams = z.object({ siteId: id, layerId: id });
export const changeLayer = endpoint({
  method: 'PATCH',
  path: '/api/sites/:siteId/layers/:layerId',
  summary: 'Say what a layer’s values mean',
  params: layerParams,
  body: z.strictObject({ unit: valueUnitSchema }),
  reply: siteSchema,
});
export const setClasses = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/layers/:layerId/classes',
  summary: 'Set the class table of `habitat`',
  params: layerParams,
  body: z.strictObject({ classes: habitatClassesSchema }),
  reply: siteSchema,
});
export const deleteLayer = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/layers/:layerId',
  summary: 'Take a layer off the site',
  params: layerParams,
  reply: siteSchema,
});
/** Decoded values in the binary of `rasters/cells/cell-values.ts`; addressed by hash so that a run's layers outlive a replaced one. */
export const getLayerValues = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/layer-values/:hash',
  summary: 'The decoded cell values of a layer',
  params: z.object({ siteId: id, hash: sha256 }),
  replyKind: 'bytes',
});
export const setPlant = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/plant',
  summary: 'Set the rates of the plant',
  params: siteParams,
  body: plantSchema,
  reply: siteSchema,
});
export const setOutlook = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/outlook',
  summary: 'Set the weather to come',
  params: siteParams,
  body: outlookSchema,
  reply: siteSchema,
});
