import { z } from 'zod';
import { siteRecordSchema } from './drought-records.ts';
import { endpoint, id, instant, text } from './endpoint.ts';
import { featureSchema } from './features.ts';
import { gridSchema } from './grid.ts';
import { knownOriginSchema, plantSchema, sitePlantSchema } from './plants.ts';
import { elevationCurvesSchema, layerPartSchema, layerSchema, tidalDatumsSchema } from './layers.ts';
import { otherOutlookSchema, outlookSchema } from './outlooks.ts';

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
  /** the cells that the site was made with, the finest that it may have */
  finestGrid: gridSchema,
  layers: z.array(layerSchema),
  /** surveyed points and areas */
  features: z.array(featureSchema),
  elevationCurves: elevationCurvesSchema,
  tidalDatums: tidalDatumsSchema,
  plant: plantSchema,
  plantSet: z.boolean(),
  /** null: typed in on this site */
  plantOrigin: knownOriginSchema.nullable(),
  outlook: outlookSchema,
  outlookSet: z.boolean(),
  /** further outlooks, oldest first */
  otherOutlooks: z.array(otherOutlookSchema),
  /** the drought record that fits are made to; null while there is none */
  droughtRecord: siteRecordSchema.nullable(),
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
export const setPlant = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/plant',
  summary: 'Set the rates of the plant',
  params: siteParams,
  body: sitePlantSchema,
  reply: siteSchema,
});
