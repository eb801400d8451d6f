import { z } from 'zod';
import { allParameters, anyRateNames } from '#sim-core/spec/all-parameters.ts';
import { figureKinds } from '#sim-core/spec/fit-figure.ts';
import { beliefSchema, beliefWithin } from '#sim-core/spec/belief.ts';
import { runSpecFields, runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { endpoint, id, instant, sha256, text } from './endpoint.ts';
import { gridSchema } from './grid.ts';
import { layerYearSchema, valueUnitSchema } from './layers.ts';

/** Most rates of one fit: each more needs many times the runs. */
export const mostFittedRates = 5;
export const mostSurveys = 12;
/** Largest budget of a fit, in runs. */
export const mostFitRuns = 20_000;

const area = z.number().min(0).max(1e12);
/** A resurvey that runs are compared with cell by cell. */
export const surveyedMapSchema = z.strictObject({
  layer: sha256,
  unit: valueUnitSchema,
  year: layerYearSchema,
  /** standard error of its covered area, as a share of it */
  areaError: z.number().min(0).max(1),
});
/** Covered area of the whole site in a year, m². */
export const surveyedAreaSchema = z.strictObject({ year: layerYearSchema, area, error: area });
/** Mean advance of edges between two years, m/yr. */
export const surveyedFrontSchema = z.strictObject({
  from: layerYearSchema,
  until: layerYearSchema,
  speed: z.number().min(-100).max(100),
  error: z.number().min(0).max(100),
});
export type SurveyedArea = z.infer<typeof surveyedAreaSchema>;
export type SurveyedFront = z.infer<typeof surveyedFrontSchema>;

export const fitDataSchema = z.strictObject({
  maps: z.array(surveyedMapSchema).max(mostSurveys),
  areas: z.array(surveyedAreaSchema).max(100),
  fronts: z.array(surveyedFrontSchema).max(mostSurveys),
});
export type FitData = z.infer<typeof fitDataSchema>;

/** A rate that is fitted, and what is believed of it before. */
export const fittedRateSchema = z
  .strictObject({ name: z.enum(anyRateNames), belief: beliefSchema })
  .superRefine(({ name, belief }, context) => {
    for (const { path, message } of beliefWithin(allParameters[name]).safeParse(belief).error?.issues ?? [])
      context.addIssue({ code: 'custom', path: ['belief', ...path], message });
  });

/** What the runs of a fit share: a RunSpec without what each run has of its own. */
export const fitBaseSchema = z.strictObject(runSpecFields).omit({ replicate: true, reportYears: true });
export type FitBase = z.infer<typeof fitBaseSchema>;

/** Most figures of all surveys together. */
const mostFigures = mostSurveys * 4 + 100;
const figureSchema = z.strictObject({
  kind: z.enum(figureKinds),
  year: layerYearSchema,
  observed: z.number(),
  error: z.number().min(0),
});

const planFields = {
  base: fitBaseSchema,
  data: fitDataSchema,
  rates: z
    .array(fittedRateSchema)
    .min(1, 'Choose at least one rate')
    .max(mostFittedRates, `At most ${mostFittedRates} rates`)
    .refine((rates) => new Set(rates.map(({ name }) => name)).size === rates.length, 'Each rate once'),
  /** what the surveys come to, in the order in which runs are compared with it */
  figures: z.array(figureSchema).min(1).max(mostFigures),
  population: z.number().int().min(20).max(1000),
  priorRuns: z.number().int().min(40).max(5000),
  mostRuns: z.number().int().min(40).max(mostFitRuns),
  leastAcceptance: z.number().gt(0).max(0.5),
};
export const fitPlanSchema = z.strictObject(planFields);
export type FitPlan = z.output<typeof fitPlanSchema>;

const points = z.array(z.number().min(0).max(1)).max(mostFittedRates);
const summaries = z.array(z.number()).max(mostFigures);
const particleSchema = z.strictObject({
  point: points,
  summaries,
  distance: z.number().min(0),
  weight: z.number().min(0),
});
const many = z.array(particleSchema).max(5000);

export const abcEndings = ['enough', 'no more runs', 'hardly any kept'] as const;
/** Where a fit stands, as `sim-core/fit/abc.ts` goes on from it. */
export const fitStateSchema = z.strictObject({
  scales: summaries,
  generations: z
    .array(
      z.strictObject({
        tolerance: z.number().min(0),
        runs: z.number().int().min(1),
        acceptance: z.number().min(0).max(1),
      }),
    )
    .max(150),
  population: many,
  kept: many,
  tried: z.number().int().min(0),
  runs: z.number().int().min(0).max(mostFitRuns),
  refused: z.number().int().min(0),
  prior: z.array(z.strictObject({ point: points, summaries })).max(5000),
  ending: z.enum(abcEndings).nullable(),
});
export type FitState = z.infer<typeof fitStateSchema>;

export const fitStatuses = ['running', 'stopped', 'finished'] as const;

const acceptedSchema = z.object({ at: instant, by: z.string(), what: z.string() });

export const fitSummarySchema = z.object({
  id,
  siteId: id,
  name: z.string(),
  /** stopped: by hand, and may go on; finished: it came to its end */
  status: z.enum(fitStatuses),
  startedAt: instant,
  startedBy: z.string(),
  rates: z.array(z.enum(anyRateNames)),
  /** years that it was fitted to */
  years: z.array(z.number().int()),
  runs: z.number().int(),
  mostRuns: z.number().int(),
  generations: z.number().int(),
  /** when its rates were taken over by the plant; null while they were not */
  accepted: acceptedSchema.nullable(),
});
export type FitSummary = z.infer<typeof fitSummarySchema>;

export const fitSchema = fitSummarySchema.omit({ rates: true, years: true }).extend({
  plan: fitPlanSchema,
  state: fitStateSchema,
  grid: gridSchema,
  layers: z.array(z.object({ hash: sha256, noData: z.number().nullable() })),
});
export type Fit = z.infer<typeof fitSchema>;

/** The runs of a plan as the engine checks them: any of them, without a draw of its own. */
export const runOfPlan = ({ base }: Pick<FitPlan, 'base'>) =>
  runSpecSchema.safeParse({ ...base, replicate: 0 });

const siteParams = z.object({ siteId: id });
const params = z.object({ siteId: id, fitId: id });
const one = '/api/sites/:siteId/fits/:fitId';

export const listFits = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/fits',
  summary: 'The fits of a site, newest first',
  params: siteParams,
  reply: z.object({ fits: z.array(fitSummarySchema) }),
});
export const startFit = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/fits',
  summary: 'Register a fit of rates to what was surveyed later',
  params: siteParams,
  body: z.strictObject({ name: text(120), ...planFields }),
  reply: fitSchema,
});
export const getFit = endpoint({
  method: 'GET',
  path: one,
  summary: 'A fit with its plan and where it stands',
  params,
  reply: fitSchema,
});
/** A state with as many runs as the stored one is the same, since all follows from the plan; one with fewer is refused. */
export const putFitState = endpoint({
  method: 'PUT',
  path: `${one}/state`,
  summary: 'Store where a fit stands; repeating it is harmless',
  params,
  body: fitStateSchema,
  reply: z.object({ runs: z.number().int() }),
});
export const stopFit = endpoint({
  method: 'POST',
  path: `${one}/stop`,
  summary: 'Stop a fit; it may go on later',
  params,
  reply: fitSchema,
});
export const resumeFit = endpoint({
  method: 'POST',
  path: `${one}/resume`,
  summary: 'Go on with a fit that was stopped',
  params,
  reply: fitSchema,
});
export const acceptFit = endpoint({
  method: 'POST',
  path: `${one}/accept`,
  summary:
    'Take the fitted rates over into the plant of the site, and as a new version into the profile that it came from',
  params,
  reply: fitSchema,
});
export const deleteFit = endpoint({
  method: 'DELETE',
  path: one,
  summary: 'Delete a fit; what was taken over from it stays',
  params,
});
