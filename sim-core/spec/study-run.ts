import { z } from 'zod';
import { drawnRatesSchema } from './uncertain.ts';

/** What is kept of one run of a study: one option at stated rates under the luck of one future. */
export const studyRunSchema = z.strictObject({
  /** number of the future whose weather and chance it has */
  replicate: z.number().int().min(0).max(0xffffff),
  /** the rates that the study set, in their units */
  rates: drawnRatesSchema,
  /** SHA-256 of all frames in order */
  digest: z.string().regex(/^[0-9a-f]{64}$/, 'a SHA-256 in hexadecimal'),
  /** null: not by the horizon */
  recoveredYear: z.number().nullable(),
  /** covered area at the survey and at the end of each year, m² */
  coveredArea: z.array(z.number().min(0)).max(501),
  /** share of the ground that can hold the plant and has closed by then, by year as above */
  closedShare: z.array(z.number().min(0).max(1)).max(501),
});
export type StudyRun = z.infer<typeof studyRunSchema>;
