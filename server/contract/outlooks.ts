import { z } from 'zod';
import { maximumYears } from '#sim-core/spec/limits.ts';
import {
  expectedLossesSchema,
  trendSchema,
  type ExpectedLoss,
  type Trend,
} from '#sim-core/spec/outlook-changes.ts';
import { boundarySchema, stepsPerYearSchema } from '#sim-core/spec/run-spec.ts';
import { drawnWeatherSchema, type WeatherSource } from '#sim-core/spec/weather-source.ts';
import { id, text } from './endpoint.ts';

export const mainOutlookName = 'The outlook';
/** An outlook that changes nothing about its weather. */
export const unchangedOutlook = { name: mainOutlookName, trend: null, losses: [], grazing: true };
/** Most outlooks that a site may keep beside its main one. */
export const mostOtherOutlooks = 11;

/** Survey, horizon, steps and edge: all outlooks of a site share them, or their futures could not be compared. */
const spanFields = {
  /** year of the survey; the first simulated year is the next one */
  surveyYear: z.number().int().min(1000).max(9000),
  years: z.number().int().min(1).max(maximumYears),
  stepsPerYear: stepsPerYearSchema,
  boundary: boundarySchema,
};

const outlookFields = {
  name: text(100).default(mainOutlookName),
  ...spanFields,
  /** one value a year, Palmer scale, from the year after the survey */
  droughtIndex: z.array(z.number().min(-15, 'Between −15 and 15').max(15, 'Between −15 and 15')),
  /** weather that each replicate of an ensemble draws for itself; null: the values above in all of them */
  drawn: drawnWeatherSchema.nullable().default(null),
  /** what makes the weather drier or wetter as time goes on */
  trend: trendSchema.nullable().default(null),
  /** losses that come under every option; those outside the horizon wait */
  losses: expectedLossesSchema.default([]),
  /** whether the grazers come that the plant names */
  grazing: z.boolean().default(true),
};
const oneAYear = {
  path: ['droughtIndex'],
  message: 'One value for each year is expected',
};

export const outlookSchema = z
  .strictObject(outlookFields)
  .refine((o) => o.droughtIndex.length === o.years, oneAYear);
export type Outlook = z.infer<typeof outlookSchema>;
/** An outlook that is kept beside the main one. */
export const otherOutlookSchema = z
  .strictObject({ ...outlookFields, id })
  .refine((o) => o.droughtIndex.length === o.years, oneAYear);
export type OtherOutlook = z.infer<typeof otherOutlookSchema>;

type Span = Pick<Outlook, keyof typeof spanFields>;

/** An outlook with the span of another: listed years keep their values, new ones are near normal. */
export function onSpan<O extends Outlook>(
  outlook: O,
  { surveyYear, years, stepsPerYear, boundary }: Span,
): O {
  const droughtIndex = Array.from(
    { length: years },
    (_, i) => outlook.droughtIndex[surveyYear + i - outlook.surveyYear] ?? 0,
  );
  return { ...outlook, surveyYear, years, stepsPerYear, boundary, droughtIndex };
}

/** What an outlook brings to a run, as a RunSpec takes it; what it does not change is left out. */
export interface OutlookWeather {
  readonly droughtIndex: WeatherSource;
  readonly trend?: Trend;
  readonly losses?: ExpectedLoss[];
  readonly grazing?: false;
}

/**
 * What an outlook brings to the runs of an ensemble and to a run of one of its futures, whose weather may be drawn, or to
 * a run of the listed years: droughts that come more often then say nothing.
 */
export function outlookWeather(outlook: Outlook, of: 'ensemble' | 'single run'): OutlookWeather {
  const { drawn, droughtIndex, trend, losses, grazing, surveyYear, years } = outlook;
  const source = of === 'ensemble' ? (drawn ?? droughtIndex) : droughtIndex;
  const renews = typeof source === 'object' && 'kind' in source && source.kind === 'renewal';
  const { shiftPerDecade, frequencyPerDecade } = trend ?? {};
  const acting: Trend = {
    ...(shiftPerDecade && { shiftPerDecade }),
    ...(renews && frequencyPerDecade !== undefined && frequencyPerDecade !== 1 && { frequencyPerDecade }),
  };
  const come = losses.filter((loss) => {
    const [from, until] =
      'year' in loss
        ? [loss.year, loss.year]
        : [loss.from ?? surveyYear + 1, loss.until ?? surveyYear + years];
    return until > surveyYear && from <= surveyYear + years;
  });
  return {
    droughtIndex: source,
    ...(Object.keys(acting).length > 0 && { trend: acting }),
    ...(come.length > 0 && { losses: come }),
    ...(!grazing && { grazing: false as const }),
  };
}
