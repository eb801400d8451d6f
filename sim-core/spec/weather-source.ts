import { z } from 'zod';
import { driest, maximumYears, wettest } from './limits.ts';

const index = z.number().min(driest).max(wettest);
/** Shortest mean interval, years: shorter ones are no droughts apart, and would be drawn for ever. */
export const shortestWait = 0.01;
const years = z.number().min(shortestWait).max(10_000);
const shape = z.number().min(0.05).max(1000);

/** How long something takes, in years. */
export const waitingLawSchema = z.discriminatedUnion('law', [
  z.strictObject({ law: z.literal('fixed'), years }),
  z.strictObject({ law: z.literal('exponential'), mean: years }),
  z.strictObject({ law: z.literal('weibull'), shape, scale: years }),
  z.strictObject({ law: z.literal('gamma'), shape, scale: years }),
]);
export type WaitingLaw = z.infer<typeof waitingLawSchema>;

/** A drought record, by year or by month, in any order. */
const series = z.strictObject({
  kind: z.literal('series'),
  values: z
    .array(
      z.strictObject({
        year: z.number().int(),
        month: z.number().int().min(1).max(12).optional(),
        value: index,
      }),
    )
    .min(1)
    .max(maximumYears * 12),
  /**
   * `dated`: each year as the record has it, the same in every replicate. `from a drawn year`: each replicate reads
   * the record on from a year of its own, beginning again at its end, so all that is known of how years follow each
   * other is kept but for one join.
   */
  order: z.enum(['dated', 'from a drawn year']),
});
export type DroughtSeries = Omit<z.infer<typeof series>, 'kind'>;
/** One value of a drought record: of a year, or of a month of it. */
export type SeriesValue = DroughtSeries['values'][number];

/** Weather that remembers: each step keeps part of the last and adds chance. */
const palmerType = z.strictObject({
  kind: z.literal('palmer-type'),
  /** long-run mean of the index, 0 unless said */
  mean: index.optional(),
  /** long-run standard deviation of the index */
  standardDeviation: z.number().min(0).max(10),
  /** share of the index that a year hands on to the next, Palmer's 0.897^12 = 0.271 unless said */
  memory: z.number().min(0).max(0.999).optional(),
  /** index at the end of the survey year; drawn from the long-run law unless said */
  start: index.optional(),
});
export type PalmerRecursion = Omit<z.infer<typeof palmerType>, 'kind'>;

/** Droughts that come back: a renewal process of their beginnings. */
const renewal = z.strictObject({
  kind: z.literal('renewal'),
  /** from the beginning of one drought to that of the next */
  returnInterval: waitingLawSchema,
  /** years since the latest drought before the end of the survey year began; that drought may still last */
  sinceLatest: z.number().min(0).max(10_000),
  /** index while a drought lasts: its mean, and the standard deviation between droughts (0 unless said) */
  depth: index,
  depthSpread: z.number().min(0).max(10).optional(),
  /** how long a drought lasts; it ends early where the next one begins */
  length: waitingLawSchema,
  /** index at other times, 0 unless said; no drought is milder */
  between: index.optional(),
});
export type DroughtRenewal = Omit<z.infer<typeof renewal>, 'kind'>;

/** Weather that each replicate draws for itself, and options under one outlook share. */
export const drawnWeatherSchema = z.discriminatedUnion('kind', [series, palmerType, renewal]);
export type DrawnWeather = z.infer<typeof drawnWeatherSchema>;

/**
 * Where the drought index comes from, Palmer scale, negative is dry: one value for all steps, one a year or one a step,
 * from the year after the survey (the same in every replicate); or drawn.
 */
export const weatherSourceSchema = z.union([
  index,
  z.array(index).max(maximumYears * 12),
  drawnWeatherSchema,
]);
export type WeatherSource = z.infer<typeof weatherSourceSchema>;
