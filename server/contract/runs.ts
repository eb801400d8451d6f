import { z } from 'zod';
import { cautionSchema } from '#sim-core/spec/caution.ts';
import { runResultSchema } from '#sim-core/spec/run-result.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { endpoint, id, instant, sha256, text } from './endpoint.ts';
import { gridSchema } from './grid.ts';
import { layerPartSchema } from './layers.ts';

export const runStatuses = ['running', 'finished', 'stopped'] as const;
export const runSummarySchema = z.object({
  id,
  siteId: id,
  name: z.string(),
  optionId: id.nullable(),
  optionName: z.string(),
  status: z.enum(runStatuses),
  startedAt: instant,
  startedBy: z.string(),
  seed: z.string(),
  mode: z.string(),
  surveyYear: z.number().int(),
  years: z.number().int(),
  /** frames that are stored */
  frames: z.number().int(),
  recoveredYear: z.number().nullable(),
  /** first year from then on that ended below the target again */
  lostYear: z.number().int().nullable(),
  digest: sha256.nullable(),
  /** latest time that it was run again, and whether the digest agreed */
  check: z.object({ at: instant, by: z.string(), agreed: z.boolean(), engineVersion: z.string() }).nullable(),
});
export type RunSummary = z.infer<typeof runSummarySchema>;

/** Which of the site's outlooks and which plant a run took, as they were called when it was started. */
export const runOriginsSchema = z.object({
  /** null where none of the site's outlooks brings this weather */
  outlook: z.object({ name: z.string(), weather: z.enum(['listed', 'drawn']) }).nullable(),
  plant: z.object({
    name: z.string(),
    /** the profile that it was taken from, its version where it is one of the team's, and whether it was changed since */
    profile: z
      .object({ name: z.string(), version: z.number().int().nullable(), changed: z.boolean() })
      .nullable(),
    /** whether the run has the rates of the site's plant; a future of a comparison may have drawn its own */
    asSet: z.boolean(),
  }),
});
export type RunOrigins = z.infer<typeof runOriginsSchema>;

export const runSchema = runSummarySchema.extend({
  spec: runSpecSchema,
  grid: gridSchema,
  crsName: z.string(),
  /** the rasters that the spec names; those that were replaced since are kept for their runs */
  layers: z.array(
    z.object({
      /** SHA-256 of the raster on the working grid, which the spec names */
      hash: sha256,
      part: layerPartSchema,
      /** the file that it was made from, as it came, and its SHA-256: `hash` where the file itself is the raster */
      fileName: z.string(),
      sourceHash: sha256,
      /** raster value that means no data */
      noData: z.number().nullable(),
      /** whether it still is the site's layer of its part */
      current: z.boolean(),
    }),
  ),
  /** years that have a stored frame, ascending */
  storedYears: z.array(z.number().int()),
  /** where belief outran data when it was started */
  cautions: z.array(cautionSchema),
  /** null for runs that were started before this was kept */
  origins: runOriginsSchema.nullable(),
  hasClosing: z.boolean(),
  result: runResultSchema.nullable(),
});
export type Run = z.infer<typeof runSchema>;

const siteParams = z.object({ siteId: id });
const runParams = z.object({ runId: id });
const frameParams = z.object({ runId: id, year: z.coerce.number().int() });

export const listRuns = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/runs',
  summary: 'The runs of a site, newest first',
  params: siteParams,
  query: z.object({
    offset: z.coerce.number().int().min(0).default(0),
    limit: z.coerce.number().int().min(1).max(100).default(50),
  }),
  reply: z.object({ runs: z.array(runSummarySchema), total: z.number().int() }),
});
export const startRun = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/runs',
  summary: 'Register a run before it starts, so that each frame is kept as it comes',
  params: siteParams,
  body: z.strictObject({ name: text(120), optionId: id, spec: runSpecSchema }),
  reply: runSchema,
});
export const getRun = endpoint({
  method: 'GET',
  path: '/api/runs/:runId',
  summary: 'A run with its spec, series and what is stored',
  params: runParams,
  reply: runSchema,
});
export const renameRun = endpoint({
  method: 'PATCH',
  path: '/api/runs/:runId',
  summary: 'Rename a run',
  params: runParams,
  body: z.strictObject({ name: text(120) }),
  reply: runSchema,
});
export const deleteRun = endpoint({
  method: 'DELETE',
  path: '/api/runs/:runId',
  summary: 'Delete a run with its frames',
  params: runParams,
});
/** Body: the frame in the binary of `rasters/cells/cell-values.ts`. Repeating it is harmless. */
export const putFrame = endpoint({
  method: 'PUT',
  path: '/api/runs/:runId/frames/:year',
  summary: 'Store the frame of a year',
  params: frameParams,
  bodyKind: 'bytes',
});
export const getFrame = endpoint({
  method: 'GET',
  path: '/api/runs/:runId/frames/:year',
  summary: 'The stored frame of a year',
  params: frameParams,
  replyKind: 'bytes',
});
/** Body and reply: closing years in the binary of `rasters/cells/cell-values.ts`. */
export const putClosing = endpoint({
  method: 'PUT',
  path: '/api/runs/:runId/closing',
  summary: 'Store the closing year of every cell',
  params: runParams,
  bodyKind: 'bytes',
});
export const getClosing = endpoint({
  method: 'GET',
  path: '/api/runs/:runId/closing',
  summary: 'The closing year of every cell',
  params: runParams,
  replyKind: 'bytes',
});
export const finishRun = endpoint({
  method: 'POST',
  path: '/api/runs/:runId/finish',
  summary: 'Close a run: all frames must be there and their digest must be the one claimed',
  params: runParams,
  body: runResultSchema,
  reply: runSchema,
});
export const stopRun = endpoint({
  method: 'POST',
  path: '/api/runs/:runId/stop',
  summary: 'Cancel a run; the frames stored so far stay',
  params: runParams,
  reply: runSchema,
});
export const checkRun = endpoint({
  method: 'POST',
  path: '/api/runs/:runId/checks',
  summary: 'Say what digest a repeat of the run came to',
  params: runParams,
  body: z.strictObject({ digest: sha256, engineVersion: z.string().max(40) }),
  reply: runSchema,
});
export const exportSeries = endpoint({
  method: 'GET',
  path: '/api/runs/:runId/series.csv',
  summary: 'The series as CSV (RFC 4180)',
  params: runParams,
  replyKind: 'bytes',
  replyType: 'text/csv',
});
export const exportSpec = endpoint({
  method: 'GET',
  path: '/api/runs/:runId/spec.json',
  summary: 'The RunSpec for the command line: each raster by file name and SHA-256',
  params: runParams,
  replyKind: 'bytes',
  replyType: 'application/json',
});
export const exportPackage = endpoint({
  method: 'GET',
  path: '/api/runs/:runId/files.zip',
  summary: 'The RunSpec with the rasters that it stood on, ready to be run from the command line',
  params: runParams,
  replyKind: 'bytes',
  replyType: 'application/zip',
});
export const exportFrame = endpoint({
  method: 'GET',
  path: '/api/runs/:runId/cover/:year',
  summary: 'The frame of a year as GeoTIFF',
  params: frameParams,
  replyKind: 'bytes',
  replyType: 'image/tiff',
});
export const exportClosing = endpoint({
  method: 'GET',
  path: '/api/runs/:runId/closing.tif',
  summary: 'The closing years as GeoTIFF',
  params: runParams,
  replyKind: 'bytes',
  replyType: 'image/tiff',
});
