import { z } from 'zod';

/** Every way in which a request can be refused. The page shows `detail`; programs look at `code`. */
export const problemCodes = [
  'invalid-request', // 400: a field is wrong, see `fields`
  'not-signed-in', // 401
  'wrong-credentials', // 401
  'token-refused', // 401: an access token that is unknown, revoked or over
  'forbidden', // 403: signed in, but the role does not allow it
  'not-found', // 404: also what another team's things look like
  'conflict', // 409: somebody else changed it meanwhile
  'gone', // 410: a link that was used or has run out
  'too-large', // 413
  'not-a-geotiff', // 422, and all below: what is wrong with a raster
  'raster-truncated',
  'raster-too-large',
  'raster-not-georeferenced',
  'raster-not-projected',
  'raster-not-metric',
  'raster-not-square',
  'raster-rotated',
  'raster-bands',
  'raster-type',
  'raster-empty',
  'raster-values',
  'raster-crs',
  'raster-elsewhere',
  'grid-mismatch',
  'digest-mismatch', // 422
  'too-many-requests', // 429
  'internal', // 500: says nothing to outsiders
] as const;
export type ProblemCode = (typeof problemCodes)[number];

/** RFC 9457 problem details, with extension members. */
export const problemSchema = z.object({
  /** `/problems/<code>` */
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  /** what was found, what was expected, how to mend it */
  detail: z.string(),
  instance: z.string().optional(),
  code: z.enum(problemCodes),
  fields: z.array(z.object({ field: z.string(), message: z.string() })).optional(),
  /** for rasters: the three parts of `detail`, to be laid out by the page */
  found: z.string().optional(),
  expected: z.string().optional(),
  remedy: z.string().optional(),
});
export type Problem = z.infer<typeof problemSchema>;
