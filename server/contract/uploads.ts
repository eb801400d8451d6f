import { z } from 'zod';
import { endpoint, id, instant, sha256 } from './endpoint.ts';
import { gridSchema } from './grid.ts';
import {
  dataTypeSchema,
  heightUnitSchema,
  layerFactsSchema,
  layerPartSchema,
  layerYearSchema,
  resamplingMethodSchema,
  valueUnitSchema,
  verticalSchema,
} from './layers.ts';
import { problemSchema } from './problem.ts';
import { siteSchema } from './sites.ts';

const crsSchema = z.object({
  epsg: z.number().int(),
  name: z.string(),
  kind: z.enum(['projected', 'geographic']),
  unit: z.enum(['metre', 'foot', 'us-foot', 'degree', 'other']),
  /** null for degrees */
  metresPerUnit: z.number().nullable(),
});

/** What a raster file says of itself, known without decoding a cell; as `rasters/describe` has it. */
export const rasterDescriptionSchema = z.object({
  width: z.number().int(),
  height: z.number().int(),
  bands: z.array(
    z.object({
      /** from 1 */
      index: z.number().int(),
      name: z.string().nullable(),
      /** `alpha` only says which cells hold data */
      role: z.enum(['data', 'alpha']),
      dataType: dataTypeSchema,
      noData: z.number().nullable(),
      /** value = stored number × scale + offset */
      scale: z.number(),
      offset: z.number(),
      unit: z.string().nullable(),
    }),
  ),
  crs: crsSchema,
  /** what the file's vertical system counts heights in; null where it names none that is known */
  heightUnit: heightUnitSchema.nullable().default(null),
  /** outer corner of the north-western cell and sides of a cell, in units of the CRS */
  originX: z.number(),
  originY: z.number(),
  cellWidth: z.number(),
  cellHeight: z.number(),
  /** sides of a cell on the ground at the raster's centre, m */
  cellMetres: z.object({ width: z.number(), height: z.number() }),
  /** whether lengths in the CRS are those on the ground, within 2 % */
  metresTrue: z.boolean(),
  /** bounding box in degrees on WGS 84 */
  lonLat: z.object({ west: z.number(), south: z.number(), east: z.number(), north: z.number() }).nullable(),
  southUp: z.boolean(),
  pixelIsPoint: z.boolean(),
  compression: z.enum(['none', 'lzw', 'deflate', 'oldDeflate', 'packBits', 'lerc', 'zstd']),
  tiled: z.boolean(),
  bigTiff: z.boolean(),
  overviews: z.number().int(),
});

export type RasterDescription = z.infer<typeof rasterDescriptionSchema>;

const cellShareSchema = z.object({ cells: z.number().int(), share: z.number() });

/** What will happen when a raster is brought onto a grid; as `rasters/align` has it. */
export const alignmentPlanSchema = z.object({
  band: z.number().int(),
  content: z.enum(['classes', 'amounts']),
  /** the cells that it will lie on */
  target: gridSchema,
  method: resamplingMethodSchema,
  /** the method that fits, where somebody chose another */
  usualMethod: resamplingMethodSchema,
  /** the file lies on these very cells */
  sameCells: z.boolean(),
  turned: z.boolean(),
  /** null where it has the grid's CRS */
  reprojection: z
    .object({
      from: crsSchema,
      to: crsSchema,
      datumShift: z.object({ from: z.string(), to: z.string(), accuracy: z.number().nullable() }).nullable(),
    })
    .nullable(),
  /** side of a grid cell over the side of a raster cell */
  cellRatio: z.number(),
  /** cells of the file outside the grid, and their share of the file */
  cropped: cellShareSchema,
  /** cells of the grid that the file does not reach, and their share of the grid */
  padded: cellShareSchema,
  scaling: z.object({ scale: z.number(), offset: z.number() }).nullable(),
  /** what people should know before they accept it, in whole sentences */
  cautions: z.array(z.object({ code: z.string(), text: z.string() })).readonly(),
});

export type AlignmentPlan = z.infer<typeof alignmentPlanSchema>;

/** The working grid that a first raster leads to, and why it is not simply the raster's own. */
export const suggestedGridSchema = z.object({
  grid: gridSchema,
  crs: crsSchema,
  asInFile: z.boolean(),
  reasons: z.array(z.string()).readonly(),
});

/** What is decided about an upload; null where the product's proposal stands, or for `part` and `band`, nothing yet. */
export const uploadChoicesSchema = z.strictObject({
  part: layerPartSchema.nullable(),
  /** from 1 */
  band: z.number().int().min(1).nullable(),
  method: resamplingMethodSchema.nullable(),
  /** what the values are, where they are shares */
  unit: valueUnitSchema.nullable(),
  /** for `elevation` */
  vertical: verticalSchema.nullable(),
  /** for `resurvey`: the year that it was flown or mapped in */
  year: layerYearSchema.nullable().default(null),
  /** the working grid that follows from the raster: only for one that makes a site */
  grid: z.strictObject({ epsg: z.number().int(), cellSize: z.number().positive() }).nullable(),
  note: z.string().trim().max(1000),
});
export type UploadChoices = z.output<typeof uploadChoicesSchema>;

/**
 * What a person should look at before the raster is placed: `part`, `band` and, of a resurvey, `year` must be chosen, and so
 * must the unit of `heights` where the file suggests feet (see `heights` beside it); `reprojection`,
 * `resampling`, `crop` and `pad` are agreed to by placing it; `values` are wrong for the part and forbid it (see
 * `complaint`).
 */
export const uploadDecisions = [
  'part',
  'band',
  'heights',
  'year',
  'reprojection',
  'resampling',
  'crop',
  'pad',
  'values',
] as const;

/**
 * waiting → reading → choices → waiting → aligning → done. `refused`: the file cannot be used. `failed`: the work broke
 * off and may be tried again. `cancelled`: somebody stopped it; it may be taken up again.
 */
export const uploadStates = [
  'waiting',
  'reading',
  'choices',
  'aligning',
  'done',
  'refused',
  'failed',
  'cancelled',
] as const;

export const uploadSchema = z.object({
  id,
  teamId: id,
  /** null for a raster that a site is yet to be made from */
  siteId: id.nullable(),
  fileName: z.string(),
  hash: sha256,
  bytes: z.number().int(),
  uploadedAt: instant,
  uploadedBy: z.string(),
  state: z.enum(uploadStates),
  /** of the reading or aligning that is under way */
  progress: z.object({ share: z.number(), secondsLeft: z.number().nullable() }).nullable(),
  /** null until it is read */
  description: rasterDescriptionSchema.nullable(),
  /** what was found in the cells of the chosen band, as they stand in the file; null until it is read */
  facts: layerFactsSchema.nullable(),
  /** outline of the raster in the CRS of the grid that it goes to, [x, y] in m, to be drawn against it */
  outline: z.array(z.tuple([z.number(), z.number()])).nullable(),
  choices: uploadChoicesSchema,
  /** null while no plan can be made: see `problem` */
  plan: alignmentPlanSchema.nullable(),
  /** for a raster that a site is yet to be made from: the grid that it leads to unless `choices.grid` says another */
  suggestedGrid: suggestedGridSchema.nullable(),
  decisions: z.array(z.enum(uploadDecisions)),
  /** what heights of the chosen band are most likely in, and what of the file says so; null where nothing does */
  heights: z.object({ unit: heightUnitSchema, because: z.string() }).nullable(),
  /** why it was refused, failed or cannot be placed as chosen */
  problem: problemSchema
    .pick({ code: true, detail: true, found: true, expected: true, remedy: true })
    .nullable(),
  /** the layer that it became */
  layerId: id.nullable(),
});
export type Upload = z.infer<typeof uploadSchema>;

const teamParams = z.object({ teamId: id });
const uploadParams = z.object({ teamId: id, uploadId: id });

/**
 * Multipart: the text fields below and one `file`. Answers as soon as the file is stored; it is read in the background.
 * With `place` = `when-clear` it becomes a layer by itself if nothing has to be decided: one band, on the site's cells,
 * its part given.
 */
export const createUpload = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/uploads',
  summary: 'Send a raster for a site, or for a site that is yet to be made',
  params: teamParams,
  bodyKind: 'form',
  body: z.strictObject({
    siteId: id.optional(),
    part: layerPartSchema.optional(),
    place: z.enum(['when-clear', 'when-asked']).default('when-asked'),
  }),
  reply: uploadSchema,
});
export const listUploads = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/uploads',
  summary:
    'The uploads of a site that have not been dismissed, oldest first; without a site, those that have none yet',
  params: teamParams,
  query: z.object({ siteId: id.optional() }),
  reply: z.object({ uploads: z.array(uploadSchema) }),
});
export const getUpload = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/uploads/:uploadId',
  summary: 'How far an upload is, what was found in it and what will be done with it',
  params: uploadParams,
  reply: uploadSchema,
});
/** At most 256 cells a side, in the binary of `rasters/cells/cell-values.ts`, north up, every nth cell of the file. */
export const getUploadThumbnail = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/uploads/:uploadId/thumbnail',
  summary: 'A small picture of the chosen band, as values',
  params: uploadParams,
  replyKind: 'bytes',
});
/** Another band is read anew; anything else only changes the plan. */
export const setUploadChoices = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/uploads/:uploadId/choices',
  summary: 'Say what part the raster plays and how it is brought onto the grid; answers with the new plan',
  params: uploadParams,
  body: uploadChoicesSchema,
  reply: uploadSchema,
});
export const placeUpload = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/uploads/:uploadId/place',
  summary: 'Agree to the plan: the raster is aligned in the background and becomes a layer',
  params: uploadParams,
  reply: uploadSchema,
});
export const makeSiteFromUpload = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/uploads/:uploadId/site',
  summary:
    'Make a site on the planned grid at once; the raster is aligned in the background and becomes its first layer',
  params: uploadParams,
  body: z.strictObject({ name: z.string().trim().min(1, 'Fill this in').max(100, 'At most 100 characters') }),
  reply: siteSchema,
});
export const cancelUpload = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/uploads/:uploadId/cancel',
  summary: 'Stop the reading or aligning; the file and what was chosen stay',
  params: uploadParams,
  reply: uploadSchema,
});
export const retryUpload = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/uploads/:uploadId/retry',
  summary: 'Take up again what was cancelled or failed',
  params: uploadParams,
  reply: uploadSchema,
});
export const dismissUpload = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/uploads/:uploadId',
  summary: 'Take an upload off the list, stopping what is under way; a layer that it became stays',
  params: uploadParams,
});
