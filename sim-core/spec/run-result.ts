import { z } from 'zod';

/** One row of a run's series: the survey first, then one a step. Areas m². */
export const seriesRowSchema = z.object({
  /** calendar year at the end of the step; the survey year for the first row; with several steps a year, a fraction */
  time: z.number(),
  /** null on the survey row */
  droughtIndex: z.number().nullable(),
  coveredArea: z.number(),
  /** ΣC / ΣC* */
  recoveredShare: z.number(),
  /** area of cells with C ≥ 0.05 */
  occupiedArea: z.number(),
  /** area of cells that have closed by now (first C ≥ half the reference) */
  closedArea: z.number(),
  /** area of cells that closed in this step */
  closingArea: z.number(),
  /** length of the border between cells with C ≥ 0.05 and cells without, m */
  edgeLength: z.number(),
  /** 8-neighbour patches of cells with C ≥ 0.05 */
  patches: z.number().int(),
  largestPatchArea: z.number(),
  /** covered area lost in this step */
  lostToDrought: z.number(),
  lostToBackground: z.number(),
  /** runs made before there were grazers do not tell it */
  lostToGrazing: z.number().default(0),
  lostToEvents: z.number(),
});
export type SeriesRow = z.infer<typeof seriesRowSchema>;

export const runResultSchema = z.object({
  series: z.array(seriesRowSchema).max(6001),
  /** ΣC* × cell area, m² */
  referenceArea: z.number(),
  /** first year in which ΣC ≥ target·ΣC*, or null: not by the horizon (censored) */
  recoveredYear: z.number().nullable(),
  /** SHA-256 of all frames in order */
  digest: z.string().regex(/^[0-9a-f]{64}$/, 'a SHA-256 in hexadecimal'),
  engineVersion: z.string(),
  /** what the spread kernel came out as */
  kernel: z.object({
    variance: z.number(),
    radius: z.number().int(),
    frontSpeed: z.number(),
    diagonalFrontSpeed: z.number(),
  }),
  warnings: z.array(z.string()),
});
export type RunResult = z.infer<typeof runResultSchema>;
