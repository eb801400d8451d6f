import { z } from 'zod';
import { weatherProblems } from '#sim-core/weather/weather-problems.ts';
import { layerSourcesSchema } from './layer-source.ts';
import { maximumYears } from './limits.ts';
import { expectedLossesSchema, trendSchema } from './outlook-changes.ts';
import { parameters, type Rates } from './parameters.ts';
import { areaSchema, coordinate, maximumPlaces, moundFields, share } from './places.ts';
import { processesSchema } from './processes.ts';
import { rateSchema } from './rate-schema.ts';
import { uncertainProblems, uncertainSchema } from './uncertain.ts';
import { weatherSourceSchema } from './weather-source.ts';

// A spec's parts are had from here, wherever they are written.
export { areaSchema, type Area } from './places.ts';
export {
  layerSourceSchema,
  layerSourcesSchema,
  mapRasters,
  placesIn,
  rasterSources,
  type Curve,
  type LayerSource,
  type LayerSources,
  type RasterSource,
} from './layer-source.ts';

/** Version of the RunSpec format; a reader refuses what it does not know. */
export const runSpecVersion = 1;

const year = z.number().int().min(1000).max(9999);

/** Works and one-off losses. What is dated in a year acts at its start and shows in that year's frame. */
export const actionSchema = z.discriminatedUnion('kind', [
  /** raises M to `strength` within `radius` of the point and fades it to 0 over a further `halo` metres */
  z.strictObject({
    kind: z.literal('mound'),
    year,
    ...moundFields,
  }),
  /** raises cover to `cover`, never above capacity */
  z.strictObject({ kind: z.literal('planting'), year, area: areaSchema, cover: share }),
  /** sets `each` clumps at every point; what finds no free site there goes to the nearest cells that have some */
  z.strictObject({
    kind: z.literal('clumps'),
    year,
    points: z
      .array(z.tuple([coordinate, coordinate]))
      .min(1)
      .max(maximumPlaces),
    each: z.number().int().min(1).max(100_000).default(1),
  }),
  /** raises F to `strength` from `year` to the end of `until` */
  z.strictObject({
    kind: z.literal('fence'),
    year,
    until: year.optional(),
    area: areaSchema,
    strength: share.default(1),
  }),
  /** removes `share` of the cover */
  z.strictObject({ kind: z.literal('loss'), year, area: areaSchema, share }),
]);
export type Action = z.infer<typeof actionSchema>;
export type Mound = Extract<Action, { kind: 'mound' }>;
export type Clumps = Extract<Action, { kind: 'clumps' }>;

export const ratesSchema: z.ZodType<Rates, Partial<Rates>> = rateSchema(parameters);

export const modeSchema = z.enum(['mean-field', 'counts']);
export const boundarySchema = z.enum(['mirror', 'bare']);
export const stepsPerYearSchema = z.union([z.literal(1), z.literal(2), z.literal(4), z.literal(12)]);
export type Mode = z.infer<typeof modeSchema>;
export type Boundary = z.infer<typeof boundarySchema>;
export type StepsPerYear = z.infer<typeof stepsPerYearSchema>;

/** The fields of a RunSpec, before the checks that look at several fields at once. */
export const runSpecFields = {
  version: z.literal(runSpecVersion),
  mode: modeSchema.default('counts'),
  /** text from which every random draw follows */
  seed: z.string().min(1).max(200),
  replicate: z.number().int().min(0).max(0xffffff).default(0),
  /** year of the survey: the first frame is its `cover`, the first simulated year is the next one */
  surveyYear: year,
  years: z.number().int().min(1).max(maximumYears),
  stepsPerYear: stepsPerYearSchema.default(1),
  boundary: boundarySchema.default('mirror'),
  rates: ratesSchema,
  processes: processesSchema.default({}),
  /** rates that each replicate draws for itself; the values above are then those of no replicate */
  uncertain: uncertainSchema.optional(),
  /** a list, or a source from which each replicate draws its own */
  droughtIndex: weatherSourceSchema.default(0),
  /** what makes the weather drier or wetter as time goes on; none unless given */
  trend: trendSchema.optional(),
  /** losses that come under every option; none unless given */
  losses: expectedLossesSchema.optional(),
  actions: z.array(actionSchema).max(maximumPlaces).default([]),
  /** share of the reference cover that counts as recovered */
  target: z.number().gt(0).max(1).default(0.9),
  /** at least one of them is a raster: it gives the grid */
  layers: layerSourcesSchema,
  /** years whose cover is reported, the survey year included; every year unless said */
  reportYears: z.array(year).optional(),
};

/** Everything that decides a run, but for the bytes of its layers. */
export const runSpecSchema = z.strictObject(runSpecFields).superRefine((spec, context) => {
  const first = spec.surveyYear + 1;
  const last = spec.surveyYear + spec.years;
  const say = (path: (string | number)[], message: string) =>
    context.addIssue({ code: 'custom', path, message });
  for (const { field, message } of weatherProblems(spec.droughtIndex, spec))
    say(['droughtIndex', ...field.split('.').filter(Boolean)], message);
  const source = spec.droughtIndex;
  const frequency = spec.trend?.frequencyPerDecade ?? 1;
  const renews = typeof source === 'object' && 'kind' in source && source.kind === 'renewal';
  if (frequency !== 1 && !renews)
    say(
      ['trend', 'frequencyPerDecade'],
      `Found ${frequency}; only droughts that come back (kind renewal) can come more often. Use shiftPerDecade`,
    );
  spec.losses?.forEach((loss, i) => {
    const [from, until] = 'year' in loss ? [loss.year, loss.year] : [loss.from ?? first, loss.until ?? last];
    const field = 'year' in loss ? 'year' : until < from ? 'until' : 'from';
    if (until < from) say(['losses', i, field], `Found ${until}, before it may first come in ${from}`);
    else if (until < first || from > last)
      say(['losses', i, field], `Falls outside the simulated years ${first} to ${last}`);
  });
  for (const { field, message } of spec.uncertain ? uncertainProblems(spec.uncertain, spec.processes) : [])
    say(['uncertain', ...field.split('.')], message);
  spec.actions.forEach((action, i) => {
    if (action.year < first || action.year > last)
      say(
        ['actions', i, 'year'],
        `Dated ${action.year}; works must fall in the simulated years ${first} to ${last}`,
      );
    if (action.kind === 'fence' && action.until !== undefined && action.until < action.year)
      say(['actions', i, 'until'], `Ends in ${action.until}, before it starts in ${action.year}`);
  });
  spec.reportYears?.forEach((y, i) => {
    if (y < spec.surveyYear || y > last)
      say(['reportYears', i], `${y} lies outside ${spec.surveyYear} to ${last}`);
  });
});
export type RunSpec = z.infer<typeof runSpecSchema>;
/** What may be left out when a RunSpec is written by hand. */
export type RunSpecInput = z.input<typeof runSpecSchema>;

/** Years that have a frame, ascending: those asked for, or every year from the survey on. */
export function frameYears(spec: Pick<RunSpec, 'surveyYear' | 'years' | 'reportYears'>): number[] {
  const asked = spec.reportYears && new Set(spec.reportYears);
  return Array.from({ length: spec.years + 1 }, (_, i) => spec.surveyYear + i).filter(
    (y) => !asked || asked.has(y),
  );
}
