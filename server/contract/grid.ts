import { z } from 'zod';

/** The working grid of a site: square cells in a projected CRS in metres; the origin is the north-west corner. */
export const gridSchema = z.object({
  width: z.number().int().positive(),
  height: z.number().int().positive(),
  cellSize: z.number().positive(),
  originX: z.number(),
  originY: z.number(),
  epsg: z.number().int(),
});
