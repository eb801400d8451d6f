import { z } from 'zod';
import { droughtRecordSchema } from '#sim-core/spec/drought-record.ts';
import { id, instant } from './endpoint.ts';

/** Where a record came from, and when. */
const provenanceFields = {
  id,
  fileName: z.string(),
  uploadedAt: instant,
  uploadedBy: z.string(),
  /** when another took its place; null for the one that the site uses */
  replacedAt: instant.nullable(),
};
export const storedRecordSchema = droughtRecordSchema.extend(provenanceFields);
export type StoredRecord = z.infer<typeof storedRecordSchema>;

/** The record that a site uses, by year on the Palmer scale; its values as uploaded are fetched on their own. */
export const siteRecordSchema = droughtRecordSchema.omit({ values: true }).extend({
  ...provenanceFields,
  years: z.array(z.object({ year: z.number().int(), index: z.number() })),
  gaps: z.array(z.number().int()),
});
export type SiteRecord = z.infer<typeof siteRecordSchema>;
