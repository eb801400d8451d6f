import { z } from 'zod';
import { endpoint, id, instant } from './endpoint.ts';
import { gridSchema } from './grid.ts';

const siteParams = z.object({ siteId: id });

/** A working cell that the site may have, and what it would mean. */
export const cellSizeSchema = z.object({
  /** times the side of the finest cell */
  factor: z.number().int(),
  grid: gridSchema,
  cells: z.number().int(),
  /** why no run could start on such cells, and what would mend it, in whole sentences; null where one can */
  problem: z.string().nullable(),
  /** speed of a front along the diagonal over that along the rows; null where there is a problem */
  frontRatio: z.number().nullable(),
  /** what the plant's rates and the surveyed points and areas say of such cells, in whole sentences */
  warnings: z.array(z.string()),
  /** what a run of the engine holds in memory, and how long a year of it takes, both estimated */
  memoryBytes: z.number(),
  secondsPerYear: z.number(),
});
export type CellSize = z.infer<typeof cellSizeSchema>;
export const listCellSizes = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/cell-sizes',
  summary: 'The working cells that the site may have, finest first',
  params: siteParams,
  reply: z.object({ cellSizes: z.array(cellSizeSchema) }),
});
/** A change of the working grid: all layers are aligned anew from their files, then the site takes them at once. */
export const gridChangeSchema = z.object({
  grid: gridSchema,
  state: z.enum(['waiting', 'aligning', 'failed']),
  progress: z.object({ share: z.number(), secondsLeft: z.number().nullable() }).nullable(),
  /** why it failed; the site is as it was */
  problem: z.string().nullable(),
  askedAt: instant,
  askedBy: z.string(),
});
export type GridChange = z.infer<typeof gridChangeSchema>;
const gridChangeReply = z.object({ gridChange: gridChangeSchema.nullable() });
export const getGridChange = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/grid-change',
  summary: 'The change of the working grid that is under way or has failed, or null',
  params: siteParams,
  reply: gridChangeReply,
});
export const startGridChange = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/grid-change',
  summary: 'Give the site another working cell; options keep their coordinates, runs keep their grid',
  params: siteParams,
  body: z.strictObject({ factor: z.number().int().min(1).max(100) }),
  reply: gridChangeReply,
});
export const cancelGridChange = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/grid-change',
  summary: 'Stop a change of the working grid, or dismiss one that failed; the site is as it was',
  params: siteParams,
});
