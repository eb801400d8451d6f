import { z } from 'zod';

export const cautionCodes = [
  'front-speed-outside-published',
  'cell-too-coarse',
  'no-drought-record',
  'horizon-beyond-record',
  'interval-beyond-record',
  'few-droughts-in-record',
  'drier-than-record',
  'trend-assumed',
  'no-refuge',
] as const;

/** Where belief outruns data: in words for people, with the figures that they rest on for whoever prints or filters. */
export const cautionSchema = z.object({
  code: z.enum(cautionCodes),
  message: z.string(),
  figures: z.record(z.string(), z.number()),
});
export type Caution = z.infer<typeof cautionSchema>;

/** A caution on a comparison, with the outlooks that it is about; empty where it is about all. */
export const comparisonCautionSchema = cautionSchema.extend({ outlooks: z.array(z.string()) });
export type ComparisonCaution = z.infer<typeof comparisonCautionSchema>;
