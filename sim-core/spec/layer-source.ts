import { z } from 'zod';
import {
  areaStrengthsSchema,
  edgesSchema,
  moundPlacesSchema,
  share,
  type AreaStrength,
  type MoundPlace,
} from './places.ts';

/** Fewest and most points of a curve. */
export const curvePoints = { least: 2, most: 20 } as const;

/** From a raster's number to a share: straight between the points, constant beyond the first and the last. */
export const curveSchema = z
  .array(z.tuple([z.number(), share]))
  .min(curvePoints.least)
  .max(curvePoints.most)
  .superRefine((points, context) => {
    const at = points.findIndex(([value], i) => i > 0 && value <= points[i - 1][0]);
    if (at > 0)
      context.addIssue({
        code: 'custom',
        path: [at, 0],
        message: `Found ${points[at][0]} after ${points[at - 1][0]}; each point must stand further right than the one before`,
      });
  });
export type Curve = z.infer<typeof curveSchema>;

const sha256 = z.string().regex(/^[0-9a-f]{64}$/, 'a SHA-256 of 64 hexadecimal digits, small letters');
const rasterMapping = {
  band: z.number().int().min(1).optional(),
  scale: z.number().optional(),
  offset: z.number().optional(),
  /** class number → share */
  classes: z.record(z.string().regex(/^-?\d+$/, 'a whole class number'), share).optional(),
  /** number, after scale and offset → share */
  curve: curveSchema.optional(),
  /** share where the raster has no data */
  fill: share.optional(),
};
const oneMapping = ({ classes, curve }: { classes?: unknown; curve?: unknown }) =>
  classes === undefined || curve === undefined;
const oneMappingOnly = {
  path: ['curve'],
  message: 'Found a class table beside it; a raster is read by one of the two',
};

/** A raster with how its numbers become shares. */
const rasterSourceSchemas = [
  z
    .strictObject({
      /** path of a GeoTIFF, relative to the spec */ file: z.string().min(1),
      /** SHA-256 of its bytes, where the spec must run on no other file */
      sha256: sha256.optional(),
      ...rasterMapping,
    })
    .refine(oneMapping, oneMappingOnly),
  z
    .strictObject({
      /** SHA-256 of an uploaded raster */ layer: sha256,
      ...rasterMapping,
    })
    .refine(oneMapping, oneMappingOnly),
] as const;
export type RasterSource = z.infer<(typeof rasterSourceSchemas)[number]>;

export type Edges = z.infer<typeof edgesSchema>;

/** Where one layer of the ground comes from. */
export type LayerSource =
  | /** one share for all cells */ number
  | RasterSource
  /** all sources multiplied, cell by cell */
  | { product: LayerSource[] }
  /** the highest of the sources, cell by cell */
  | { highest: LayerSource[] }
  /** 0 but where surveyed mounds shelter; where they overlap, the stronger counts */
  | { mounds: MoundPlace[]; edges?: Edges }
  /** 0 but for the strength of each area in its cells; where they overlap, the stronger counts */
  | { areas: AreaStrength[]; edges?: Edges };

/** How deep products and highests may stand in one another: enough for a product of class table and curve in a highest. */
const deepest = 3;
const mostParts = 10;

const simpleSources = [
  share,
  ...rasterSourceSchemas,
  z.strictObject({ mounds: moundPlacesSchema, edges: edgesSchema }),
  z.strictObject({ areas: areaStrengthsSchema, edges: edgesSchema }),
] as const;
const said =
  'Expected a share from 0 to 1, or an object with one of `file`, `layer`, `product`, `highest`, `mounds`, `areas`' +
  ` (products and highests at most ${deepest} deep)`;

function sourceSchema(depth: number): z.ZodType<LayerSource, unknown> {
  if (depth === 0) return z.union(simpleSources, said);
  const parts = z
    .array(sourceSchema(depth - 1))
    .min(2)
    .max(mostParts);
  return z.union(
    [...simpleSources, z.strictObject({ product: parts }), z.strictObject({ highest: parts })],
    said,
  );
}
export const layerSourceSchema = sourceSchema(deepest);

export const layerSourcesSchema = z.strictObject({
  capacity: layerSourceSchema.default(1),
  vigour: layerSourceSchema.default(1),
  exposure: layerSourceSchema.default(0),
  refuge: layerSourceSchema.default(0),
  fence: layerSourceSchema.default(0),
  cover: layerSourceSchema,
});
export type LayerSources = z.infer<typeof layerSourcesSchema>;

const isRaster = (source: LayerSource): source is RasterSource =>
  typeof source === 'object' && ('file' in source || 'layer' in source);

/** The rasters that a source reads, in order, with the place of each within it: '' or `.product.1` and the like. */
export function rasterSources(source: LayerSource, at = ''): { at: string; raster: RasterSource }[] {
  if (isRaster(source)) return [{ at, raster: source }];
  if (typeof source === 'number') return [];
  if ('product' in source)
    return source.product.flatMap((part, i) => rasterSources(part, `${at}.product.${i}`));
  if ('highest' in source)
    return source.highest.flatMap((part, i) => rasterSources(part, `${at}.highest.${i}`));
  return [];
}

/** The same source with other rasters in the place of its own. */
export function mapRasters(source: LayerSource, other: (raster: RasterSource) => RasterSource): LayerSource {
  if (isRaster(source)) return other(source);
  if (typeof source === 'number') return source;
  if ('product' in source) return { product: source.product.map((part) => mapRasters(part, other)) };
  if ('highest' in source) return { highest: source.highest.map((part) => mapRasters(part, other)) };
  return source;
}

/** The surveyed mounds and areas that a source holds, in order. */
export function placesIn(source: LayerSource): { mounds: MoundPlace[]; areas: AreaStrength[] } {
  if (typeof source === 'number') return { mounds: [], areas: [] };
  if ('mounds' in source) return { mounds: source.mounds, areas: [] };
  if ('areas' in source) return { mounds: [], areas: source.areas };
  const parts = 'product' in source ? source.product : 'highest' in source ? source.highest : [];
  const found = parts.map(placesIn);
  return { mounds: found.flatMap(({ mounds }) => mounds), areas: found.flatMap(({ areas }) => areas) };
}
