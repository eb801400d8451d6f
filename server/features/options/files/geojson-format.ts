import { z } from 'zod';
import { workSetSchema } from '#contract/works.ts';

/**
 * What an exported option is as GeoJSON (RFC 7946). `docs/option-geojson.schema.json` is made of this, and
 * `docs/option-geojson.md` tells it in words.
 */
const position = z.tuple([z.number(), z.number()]);
const point = z.object({ type: z.literal('Point'), coordinates: position });
const points = z.object({ type: z.literal('MultiPoint'), coordinates: z.array(position).min(1) });
const outline = z.object({
  type: z.literal('Polygon'),
  coordinates: z
    .array(z.array(position).min(4))
    .min(1)
    .describe(
      'an outline, anticlockwise, then its holes, clockwise; the first position of each repeated at the end',
    ),
});

const share = z.number().min(0).max(1);
const shared = {
  year: z.int().describe('acts at the start of this year'),
  name: z.string().optional(),
  set: z.string().optional().describe('one of `foothold.sets`'),
};
const radius = z
  .number()
  .positive()
  .optional()
  .describe('m, of a disc around the point; left out for outlines');
const feature = <G extends z.ZodType, P extends z.ZodRawShape>(geometry: G, kind: string, properties: P) =>
  z.object({
    type: z.literal('Feature'),
    id: z.string().describe('unique within the option'),
    geometry,
    properties: z.strictObject({ kind: z.literal(kind), ...shared, ...properties }),
  });

export const optionFeatureSchema = z.union([
  feature(point, 'mound', {
    radius: z.number().positive().max(1000).describe('m'),
    strength: share.describe('of the shelter, 1 is full'),
    halo: z.number().min(0).max(1000).describe('m over which it fades out beyond the radius'),
  }),
  feature(points, 'clumps', { each: z.int().min(1).describe('clumps set at each point') }),
  feature(z.union([point, outline]), 'planting', { radius, cover: share.describe('cover that is planted') }),
  feature(z.union([point, outline]), 'fence', {
    radius,
    strength: share.describe('share of grazers that it keeps out'),
    until: z.int().optional().describe('last year; it stands to the end when left out'),
  }),
  feature(z.union([point, outline]), 'loss', { radius, share: share.describe('of the cover that is lost') }),
]);

export const optionGeoJsonSchema = z.object({
  type: z.literal('FeatureCollection'),
  foothold: z.object({
    format: z.literal('option'),
    version: z.literal(1),
    name: z.string(),
    note: z.string(),
    sets: z.array(workSetSchema).describe('how patterns laid works; coordinates in the CRS of the site, m'),
    siteCrs: z.string().describe('CRS of the site, EPSG code'),
  }),
  crs: z
    .object({ type: z.literal('name'), properties: z.object({ name: z.string() }) })
    .optional()
    .describe(
      'only where coordinates are not in WGS 84: urn:ogc:def:crs:EPSG::<code>, the form of GeoJSON 2008',
    ),
  features: z.array(optionFeatureSchema),
});
export type OptionFeature = z.infer<typeof optionFeatureSchema>;
export type OptionGeoJson = z.infer<typeof optionGeoJsonSchema>;
