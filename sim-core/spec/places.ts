import { z } from 'zod';

export const share = z.number().min(0).max(1);
export const coordinate = z.number();
const metres = z.number().positive();

const ringSchema = z
  .array(z.tuple([coordinate, coordinate]))
  .min(3)
  .max(10_000);

/**
 * Places on the ground, in the site's CRS, m. A cell belongs to an area when its centre does, unless the source that the
 * area stands in says otherwise (`edges`). What holes hold is outside.
 */
export const areaSchema = z.discriminatedUnion('shape', [
  z.strictObject({ shape: z.literal('disc'), x: coordinate, y: coordinate, radius: metres }),
  z.strictObject({
    shape: z.literal('polygon'),
    ring: ringSchema,
    holes: z.array(ringSchema).min(1).max(1000).optional(),
  }),
]);
export type Area = z.infer<typeof areaSchema>;

/** What a mound shelters: `strength` within `radius` of its point, fading to 0 over a further `halo` metres. */
export const moundFields = {
  x: coordinate,
  y: coordinate,
  radius: metres.max(1000),
  strength: share.default(1),
  halo: z.number().min(0).max(1000).default(0),
};
const moundPlaceSchema = z.strictObject(moundFields);
export type MoundPlace = z.infer<typeof moundPlaceSchema>;

/**
 * What a cell on the edge of a place gets: left out, all of it or nothing, by its centre; `shared`, the share of its ground
 * that the place takes, so that the area of small places does not hang on the cells.
 */
export const edgesSchema = z.literal('shared').optional();

/** Most mounds or areas that one list may hold. */
export const maximumPlaces = 20_000;
export const moundPlacesSchema = z.array(moundPlaceSchema).min(1).max(maximumPlaces);
const areaStrengthSchema = z.strictObject({ area: areaSchema, strength: share.default(1) });
export type AreaStrength = z.infer<typeof areaStrengthSchema>;
export const areaStrengthsSchema = z.array(areaStrengthSchema).min(1).max(maximumPlaces);
