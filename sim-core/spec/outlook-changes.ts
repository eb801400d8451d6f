import { z } from 'zod';
import { areaSchema, share } from './places.ts';

/** What makes the weather to come drier, or wetter, than the source says; acts from the survey on. */
export const trendSchema = z.strictObject({
  /** index units that every step is shifted by, per decade; negative is drier */
  shiftPerDecade: z.number().min(-5).max(5).optional(),
  /** how many times as often droughts begin after each decade; for a renewal of droughts alone */
  frequencyPerDecade: z.number().min(0.2).max(5).optional(),
});
export type Trend = z.infer<typeof trendSchema>;

/** Most losses that one outlook may expect. */
export const maximumLosses = 50;
const year = z.number().int().min(1000).max(9999);
const yearly = z.number().gt(0).max(1);

/**
 * A loss that comes whatever the option: in a given year, or by chance in any year from one to another. It takes `share`
 * of the cover of an area, or of the whole site.
 */
export const expectedLossSchema = z.union([
  z.strictObject({ year, share, area: areaSchema.optional() }),
  z.strictObject({
    /** that it comes in a year */
    chance: yearly,
    /** first and last year in which it may come: all of them unless said */
    from: year.optional(),
    until: year.optional(),
    share,
    area: areaSchema.optional(),
  }),
]);
export type ExpectedLoss = z.infer<typeof expectedLossSchema>;
export const expectedLossesSchema = z.array(expectedLossSchema).max(maximumLosses);
