import { z } from 'zod';
import { maximumYears } from './limits.ts';

/** `palmer`: an index on the Palmer scale. `standardised`: SPEI or SPI, in standard deviations. */
export const indexKindSchema = z.enum(['palmer', 'standardised']);
export type IndexKind = z.infer<typeof indexKindSchema>;

const month = z.number().int().min(1).max(12);
/** Values of a record, before any mapping: of a year, or of a month of it. */
export const recordValueSchema = z.strictObject({
  year: z.number().int().min(-9999).max(9999),
  month: month.optional(),
  value: z.number().min(-50).max(50),
});
export type RecordValue = z.infer<typeof recordValueSchema>;

/**
 * A drought record as it was uploaded, and how it is read: index × `factor`, averaged over the months of a season. A
 * season that ends in an earlier month than it begins belongs to the year in which it ends.
 */
export const droughtRecordSchema = z.strictObject({
  name: z.string().trim().min(1).max(100),
  /** where it comes from, in the team's words */
  source: z.string().trim().max(1000).default(''),
  kind: indexKindSchema,
  /** Palmer units that a unit of the record stands for; 1 for a Palmer-type index */
  factor: z.number().gt(0).max(10),
  season: z.strictObject({ from: month, to: month }).default({ from: 1, to: 12 }),
  values: z
    .array(recordValueSchema)
    .min(1)
    .max(maximumYears * 12),
});
export type DroughtRecord = z.infer<typeof droughtRecordSchema>;
