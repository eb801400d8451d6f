import { z } from 'zod';
import { endpoint, id, sha256 } from './endpoint.ts';
import { featureAttributesSchema, featureImportFormSchema, featureImportReplySchema } from './features.ts';
import {
  elevationCurvesSchema,
  habitatClassesSchema,
  layerHistoryEntrySchema,
  layerPartSchema,
  layerYearSchema,
  tidalDatumsSchema,
  valueUnitSchema,
  verticalSchema,
} from './layers.ts';
import { siteSchema } from './sites.ts';

const siteParams = z.object({ siteId: id });

/**
 * Multipart: the text field below and one `file`. For a raster that needs no decision: one band on the site's cells. Any
 * other is refused; send it as an upload. A layer of the same part is replaced and stays in the part's history.
 */
export const uploadLayer = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/layers',
  summary: 'Add or replace a layer',
  params: siteParams,
  bodyKind: 'form',
  body: z.strictObject({
    part: layerPartSchema,
    /** of a `resurvey`, as text */
    year: z.coerce.number().pipe(layerYearSchema).optional(),
  }),
  reply: siteSchema,
});
const layerParams = z.object({ siteId: id, layerId: id });
export const changeLayer = endpoint({
  method: 'PATCH',
  path: '/api/sites/:siteId/layers/:layerId',
  summary: 'Say what a layer’s values mean, and what people should know about it',
  params: layerParams,
  body: z.strictObject({
    unit: valueUnitSchema.optional(),
    vertical: verticalSchema.optional(),
    /** of a `resurvey` */
    year: layerYearSchema.optional(),
    note: z.string().trim().max(1000, 'At most 1000 characters').optional(),
  }),
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
/** A layer that stands is taken off the site and stays in its part's history; one of the history goes for good. */
export const deleteLayer = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/layers/:layerId',
  summary:
    'Take a layer off the site, or out of the history; refused with `conflict` while runs stand on one of the history',
  params: layerParams,
  reply: siteSchema,
});
/** What would be felt if a layer went. */
export const layerDependentsSchema = z.object({
  /** how many runs stand on it, and the latest of them by name; they keep it */
  runs: z.number().int(),
  runNames: z.array(z.string()),
  /** what it is to the site, in words, a sentence each: a run cannot start without it, a class table goes with it … */
  /** how many comparisons stand on it */
  comparisons: z.number().int(),
  consequences: z.array(z.string()),
});
export type LayerDependents = z.infer<typeof layerDependentsSchema>;
export const getLayerDependents = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/layers/:layerId/dependents',
  summary: 'What depends on a layer',
  params: layerParams,
  reply: layerDependentsSchema,
});
export const getLayerHistory = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/layer-history',
  summary: 'The layers that play or have played a part, newest first',
  params: siteParams,
  query: z.object({ part: layerPartSchema }),
  reply: z.object({ entries: z.array(layerHistoryEntrySchema) }),
});
/** On the site's cells it stands at once; one from an earlier grid is aligned anew as an upload (see `listUploads`). */
export const putLayerBack = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/layers/:layerId/put-back',
  summary: 'Let a layer of the history play its part again',
  params: layerParams,
  reply: siteSchema,
});
/** By the hash of a layer or of the file that it was made from. */
export const getLayerFile = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/layer-files/:hash',
  summary: 'A layer as GeoTIFF: as it came, or on the working grid',
  params: z.object({ siteId: id, hash: sha256 }),
  replyKind: 'bytes',
  replyType: 'image/tiff',
});
/** Decoded values in the binary of `rasters/cells/cell-values.ts`; addressed by hash so that a run's layers outlive a replaced one. */
export const getLayerValues = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/layer-values/:hash',
  summary: 'The decoded cell values of a layer',
  params: z.object({ siteId: id, hash: sha256 }),
  replyKind: 'bytes',
});
export const setElevationCurves = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/elevation-curves',
  summary:
    'Set what elevation does to capacity, vigour and exposure, and the levels of the tide drawn beside it',
  params: siteParams,
  body: z.strictObject({ elevationCurves: elevationCurvesSchema, tidalDatums: tidalDatumsSchema }),
  reply: siteSchema,
});

/** Multipart: the text fields of `featureImportFormSchema` and one `file`. */
export const importFeatures = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/feature-imports',
  summary: 'Read points and areas from GeoJSON or CSV, to look at or to keep',
  params: siteParams,
  bodyKind: 'form',
  body: featureImportFormSchema,
  reply: featureImportReplySchema,
});
const featureParams = z.object({ siteId: id, featureId: id });
export const changeFeature = endpoint({
  method: 'PATCH',
  path: '/api/sites/:siteId/features/:featureId',
  summary: 'Change the attributes of a feature',
  params: featureParams,
  body: featureAttributesSchema.partial(),
  reply: siteSchema,
});
export const deleteFeature = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/features/:featureId',
  summary: 'Delete a feature; runs keep what they were started with',
  params: featureParams,
  reply: siteSchema,
});
export const deleteFeatureImport = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/feature-imports/:importId',
  summary: 'Delete all features that came with one file',
  params: z.object({ siteId: id, importId: id }),
  reply: siteSchema,
});
