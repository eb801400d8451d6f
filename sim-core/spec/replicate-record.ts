import { z } from 'zod';
import { drawnRatesSchema } from './uncertain.ts';

const area = z.number().min(0);

/** What is kept of one replicate: enough for every statistic, and to know it again when it is run alone. Areas m². */
export const replicateRecordSchema = z.strictObject({
  replicate: z.number().int().min(0),
  /** SHA-256 of all frames in order */
  digest: z.string().regex(/^[0-9a-f]{64}$/, 'a SHA-256 in hexadecimal'),
  /** null: not by the horizon */
  recoveredYear: z.number().nullable(),
  /** first year from then on that ended below the target again */
  lostYear: z.number().int().nullable(),
  /** first year with a drought at or below the threshold, null where none comes by the horizon */
  droughtYear: z.number().int().nullable(),
  /** covered area at the survey and at the end of each year */
  coveredArea: z.array(area).max(501),
  /** driest index of each simulated year */
  droughtIndex: z.array(z.number()).max(500),
  /** covered area lost over all years, by cause */
  lost: z.strictObject({ drought: area, background: area, grazing: area, events: area }),
  /** the rates that it drew, in their units; none where all rates are fixed, as they were in the first records */
  drawn: drawnRatesSchema.default({}),
});
export type ReplicateRecord = z.infer<typeof replicateRecordSchema>;
