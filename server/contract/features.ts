import { z } from 'zod';
import { areaSchema } from '#sim-core/spec/run-spec.ts';
import { id, instant, sha256 } from './endpoint.ts';
import { shareSchema } from './layers.ts';

/** What a feature does: shelters (`refuge`), keeps grazers out (`fence`), or says where works may go (`allowed`). */
export const featureKinds = ['refuge', 'fence', 'allowed'] as const;
export const featureKindSchema = z.enum(featureKinds);
export type FeatureKind = z.infer<typeof featureKindSchema>;

/** Attributes that people may change. */
export const featureAttributesSchema = z.strictObject({
  name: z.string().trim().max(100),
  /** of the refuge or the fence; nothing for `allowed` */
  strength: shareSchema,
  /** m over which a refuge that is a disc fades to nothing beyond its radius; else 0 */
  halo: z.number().min(0).max(1000),
  /** m; null for a polygon */
  radius: z.number().positive().max(1000).nullable(),
});
export type FeatureAttributes = z.infer<typeof featureAttributesSchema>;

/**
 * What a cell on the edge of a feature gets: `shared`, the share of its ground that the feature takes; `centre`, all or
 * nothing by its centre. Allowed ground goes by the centre always: a permit ends at its line.
 */
export const featureEdgesSchema = z.enum(['centre', 'shared']);

/**
 * A surveyed point or area on a site. Points are discs with a radius. Coordinates are in the site's CRS, m.
 */
export const featureSchema = z.object({
  id,
  kind: featureKindSchema,
  name: z.string(),
  shape: areaSchema,
  strength: z.number(),
  halo: z.number(),
  edges: featureEdgesSchema,
  /** the file that it came with, and the row or feature in it, from 1 */
  source: z.object({
    importId: id,
    fileName: z.string(),
    hash: sha256,
    row: z.number().int(),
    crsName: z.string(),
    importedAt: instant,
    importedBy: z.string(),
  }),
});
export type Feature = z.infer<typeof featureSchema>;

/** Most features of a site, and most corners of their polygons together. */
export const mostFeatures = 5000;
export const mostCorners = 20_000;

/**
 * Text fields of a form, beside one `file`. GeoJSON (RFC 7946, or with the `crs` member of its forerunner) with Point, MultiPoint,
 * Polygon and MultiPolygon, or CSV with a header row: `x` and `y` in the site's CRS or `lon` and `lat`, under these and
 * their usual names. Columns and properties `name`, `radius`, `strength` and `halo` are found by name.
 */
export const featureImportFormSchema = z.strictObject({
  kind: featureKindSchema,
  /** where the file does not say, m */
  radius: z.coerce.number().positive().max(1000).default(2),
  strength: z.coerce.number().min(0).max(1).default(1),
  halo: z.coerce.number().min(0).max(1000).default(0),
  /** `preview` stores nothing; `all` stores all or refuses; `good` leaves out what has a problem */
  take: z.enum(['preview', 'all', 'good']).default('preview'),
});
export type FeatureImportForm = z.infer<typeof featureImportFormSchema>;

export const featureImportReplySchema = z.object({
  /** how the file was read, in words: format, delimiter, columns, CRS */
  read: z.string(),
  crsName: z.string(),
  /** good ones; stored unless this was a preview. At most the first 500 are listed. */
  features: z.array(
    featureSchema
      .pick({ kind: true, name: true, shape: true, strength: true, halo: true })
      .extend({ row: z.number().int() }),
  ),
  good: z.number().int(),
  /** rows or features that cannot be taken, from 1 (the header of a CSV is row 1), with the reason; at most the first 200 */
  problems: z.array(z.object({ row: z.number().int(), message: z.string() })),
  bad: z.number().int(),
  /** what the cells of the site make of the good ones, in whole sentences; may be empty */
  cautions: z.array(z.string()),
  /** null for a preview */
  importId: id.nullable(),
});
export type FeatureImportReply = z.infer<typeof featureImportReplySchema>;
