import { z } from 'zod';
import { comparisonCautionSchema } from '#sim-core/spec/caution.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';
import { runSpecFields, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { replicateRecordSchema } from '#sim-core/spec/replicate-record.ts';
import { expectedLossesSchema, trendSchema } from '#sim-core/spec/outlook-changes.ts';
import { beliefsThatApply } from '#sim-core/spec/uncertain.ts';
import { unitCostsSchema } from '#sim-core/spec/unit-costs.ts';
import { weatherSourceSchema } from '#sim-core/spec/weather-source.ts';
import { endpoint, id, instant, sha256, text } from './endpoint.ts';
import { gridSchema } from './grid.ts';

/** Most ensembles of one comparison, and replicates of each. */
export const mostOptions = 8;
export const mostOutlooks = 4;
export const mostReplicates = 2000;

/** What all runs of a comparison share: a RunSpec without what an option, an outlook or a replicate decides. */
export const commonSchema = z
  .strictObject(runSpecFields)
  .omit({ replicate: true, droughtIndex: true, trend: true, losses: true, actions: true, reportYears: true });

const outlookSchema = z.strictObject({
  name: text(100),
  droughtIndex: weatherSourceSchema,
  trend: trendSchema.optional(),
  /** losses that come under every option */
  losses: expectedLossesSchema.optional(),
  /** false: the grazers that the plant names stay away */
  grazing: z.boolean().optional(),
});
export type ComparedOutlook = z.infer<typeof outlookSchema>;
const money = z.number().min(0).max(1e12);

const stopRuleSchema = z.strictObject({
  /** replicates of each option before any look */
  atLeast: z.number().int().min(2).max(mostReplicates),
  halfWidth: z.number().gt(0).max(0.5).optional(),
  rankSettled: z.boolean().optional(),
});

const planFields = {
  common: commonSchema,
  outlooks: z.array(outlookSchema).min(1).max(mostOutlooks),
  replicates: z.number().int().min(2).max(mostReplicates),
  /** null: all replicates are run */
  stop: stopRuleSchema.nullable(),
  /** index at or below which a year counts as the next drought */
  droughtThreshold: z.number().min(driest).max(wettest),
  /** years of which maps are kept, ascending */
  mapYears: z
    .array(z.number().int())
    .min(1)
    .max(60)
    .refine((years) => years.every((year, i) => i === 0 || year > years[i - 1]), 'Years in ascending order'),
  /** of the costs; null where nobody has set any */
  currency: z
    .string()
    .regex(/^[A-Z]{3}$/)
    .nullable(),
  /** prices and budget as they were when it began; null where nobody had set any, absent of plans from before they were kept */
  unitCosts: unitCostsSchema.nullable().optional(),
};

/** An option as it was when the comparison began: later changes of it change nothing here. */
export const comparedOptionSchema = z.object({
  optionId: id,
  name: z.string(),
  wait: z.boolean(),
  revision: z.number().int(),
  actions: runSpecFields.actions,
  /** what its works cost to the horizon, null where no costs are set */
  cost: money.nullable(),
});
export type ComparedOption = z.infer<typeof comparedOptionSchema>;

export const comparisonPlanSchema = z.object({ ...planFields, options: z.array(comparedOptionSchema) });
export type ComparisonPlan = z.infer<typeof comparisonPlanSchema>;

/** The run of one replicate of an option (by place in the plan) under an outlook: all options share its luck. */
export function replicateSpec(
  { common, options, outlooks }: Pick<ComparisonPlan, 'common' | 'options' | 'outlooks'>,
  option: number,
  outlook: number,
  replicate: number,
): RunSpec {
  const { droughtIndex, trend, losses, grazing = true } = outlooks[outlook];
  const { uncertain, ...fixed } = common;
  const processes = grazing ? common.processes : { ...common.processes, grazers: undefined };
  const beliefs = uncertain && beliefsThatApply(uncertain, processes);
  return {
    ...fixed,
    processes,
    ...(beliefs && { uncertain: beliefs }),
    replicate,
    droughtIndex,
    ...(trend && { trend }),
    ...(losses && { losses }),
    actions: options[option].actions,
  };
}

/** A map of an ensemble: `closing` (median year), `chance-<year>` and `cover-<year>` (bytes, k/255). */
export const mapNameSchema = z
  .string()
  .regex(/^(closing|(chance|cover)-\d{4})$/, 'closing, chance-<year> or cover-<year>');

export const comparisonStatuses = ['running', 'stopped', 'finished'] as const;
export const endings = ['all replicates', 'chances known', 'rank settled', 'stopped by hand'] as const;

export const decisionSchema = z.object({
  optionId: id,
  optionName: z.string(),
  reason: z.string(),
  reservations: z.string(),
  decidedAt: instant,
  decidedBy: z.string(),
});
export type Decision = z.infer<typeof decisionSchema>;

export const comparisonSummarySchema = z.object({
  id,
  siteId: id,
  name: z.string(),
  status: z.enum(comparisonStatuses),
  /** why it ended; null while it runs, and of a copy that nobody has gone on with */
  ending: z.enum(endings).nullable(),
  startedAt: instant,
  startedBy: z.string(),
  options: z.array(z.string()),
  outlooks: z.array(z.string()),
  replicates: z.number().int(),
  /** replicates that every ensemble has */
  done: z.number().int(),
  /** once taken, nothing of the comparison changes any more */
  decision: decisionSchema.nullable(),
});
export type ComparisonSummary = z.infer<typeof comparisonSummarySchema>;

export const ensembleSchema = z.object({
  /** place in the plan */
  option: z.number().int(),
  outlook: z.number().int(),
  /** replicates that are stored */
  done: z.number().int(),
  /** maps that are stored, by name, with how many replicates they show */
  maps: z.record(z.string(), z.number().int()),
  /** replicates in the stored state of its maps, from which work goes on after a reload; null where there is none */
  mapsState: z.number().int().nullable(),
});
export type Ensemble = z.infer<typeof ensembleSchema>;

export const comparisonSchema = comparisonSummarySchema.omit({ options: true, outlooks: true }).extend({
  plan: comparisonPlanSchema,
  grid: gridSchema,
  crsName: z.string(),
  layers: z.array(z.object({ hash: sha256, noData: z.number().nullable() })),
  /** where belief outran data when it was started */
  cautions: z.array(comparisonCautionSchema),
  ensembles: z.array(ensembleSchema),
  /** what happened to it, oldest first */
  events: z.array(z.object({ at: instant, by: z.string(), what: z.string() })),
});
export type Comparison = z.infer<typeof comparisonSchema>;

const siteParams = z.object({ siteId: id });
const params = z.object({ siteId: id, comparisonId: id });
export const ensembleParams = params.extend({
  option: z.coerce
    .number()
    .int()
    .min(0)
    .max(mostOptions - 1),
  outlook: z.coerce
    .number()
    .int()
    .min(0)
    .max(mostOutlooks - 1),
});
const one = '/api/sites/:siteId/comparisons/:comparisonId';
export const ensemblePath = `${one}/ensembles/:option/:outlook`;

export const listComparisons = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/comparisons',
  summary: 'The comparisons of a site, newest first',
  params: siteParams,
  query: z.object({
    offset: z.coerce.number().int().min(0).default(0),
    limit: z.coerce.number().int().min(1).max(100).default(50),
  }),
  reply: z.object({ comparisons: z.array(comparisonSummarySchema), total: z.number().int() }),
});
export const startComparison = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/comparisons',
  summary: 'Register a comparison before it starts; the works of its options are kept as they are now',
  params: siteParams,
  body: z.strictObject({
    name: text(120),
    ...planFields,
    options: z
      .array(z.strictObject({ optionId: id, cost: money.nullable() }))
      .min(1)
      .max(mostOptions)
      .refine(
        (options) => new Set(options.map((o) => o.optionId)).size === options.length,
        'Each option may stand in a comparison once',
      ),
  }),
  reply: comparisonSchema,
});
export const getComparison = endpoint({
  method: 'GET',
  path: one,
  summary: 'A comparison with its plan and what is stored of it',
  params,
  reply: comparisonSchema,
});
export const renameComparison = endpoint({
  method: 'PATCH',
  path: one,
  summary: 'Rename a comparison',
  params,
  body: z.strictObject({ name: text(120) }),
  reply: comparisonSchema,
});
export const deleteComparison = endpoint({
  method: 'DELETE',
  path: one,
  summary: 'Delete a comparison on which nothing was decided',
  params,
});
export const copyComparison = endpoint({
  method: 'POST',
  path: `${one}/copies`,
  summary: 'Go on in a copy: the plan, the replicates and the maps, without the decision',
  params,
  body: z.strictObject({
    name: text(120),
    replicates: z.number().int().min(2).max(mostReplicates),
  }),
  reply: comparisonSchema,
});
export const putReplicates = endpoint({
  method: 'PUT',
  path: `${ensemblePath}/replicates`,
  summary: 'Store replicates of one ensemble; repeating it is harmless',
  params: ensembleParams,
  body: z.strictObject({ replicates: z.array(replicateRecordSchema).min(1).max(64) }),
  reply: z.object({ done: z.number().int() }),
});
export const getReplicates = endpoint({
  method: 'GET',
  path: `${ensemblePath}/replicates`,
  summary: 'The stored replicates of one ensemble, ascending',
  params: ensembleParams,
  query: z.object({
    offset: z.coerce.number().int().min(0).default(0),
    limit: z.coerce.number().int().min(1).max(500).default(500),
  }),
  reply: z.object({ replicates: z.array(replicateRecordSchema), total: z.number().int() }),
});
const shownReplicates = z.object({ replicates: z.coerce.number().int().min(1).max(mostReplicates) });
/** Body: a map in the binary of `rasters/cells/cell-values.ts`. */
export const putEnsembleMap = endpoint({
  method: 'PUT',
  path: `${ensemblePath}/maps/:map`,
  summary: 'Store a map of an ensemble and how many replicates it shows',
  params: ensembleParams.extend({ map: mapNameSchema }),
  query: shownReplicates,
  bodyKind: 'bytes',
});
export const getEnsembleMap = endpoint({
  method: 'GET',
  path: `${ensemblePath}/maps/:map`,
  summary: 'A map of an ensemble',
  params: ensembleParams.extend({ map: mapNameSchema }),
  replyKind: 'bytes',
});
/** Body and reply: what the browser needs to go on with the maps of an ensemble; the server does not look into it. */
export const putMapsState = endpoint({
  method: 'PUT',
  path: `${ensemblePath}/maps-state`,
  summary: 'Store the counts behind the maps of an ensemble',
  params: ensembleParams,
  query: shownReplicates,
  bodyKind: 'bytes',
});
export const getMapsState = endpoint({
  method: 'GET',
  path: `${ensemblePath}/maps-state`,
  summary: 'The stored counts behind the maps of an ensemble',
  params: ensembleParams,
  replyKind: 'bytes',
});
export const endComparison = endpoint({
  method: 'POST',
  path: `${one}/end`,
  summary: 'Close a comparison, or stop it; it can be resumed until something is decided on it',
  params,
  body: z.strictObject({ ending: z.enum(endings) }),
  reply: comparisonSchema,
});
export const resumeComparison = endpoint({
  method: 'POST',
  path: `${one}/resume`,
  summary: 'Go on with a comparison that was stopped, or with more replicates',
  params,
  body: z.strictObject({ replicates: z.number().int().min(2).max(mostReplicates) }),
  reply: comparisonSchema,
});
export const decide = endpoint({
  method: 'POST',
  path: `${one}/decision`,
  summary: 'Record which option was chosen and why; the comparison is frozen by it',
  params,
  body: z.strictObject({
    optionId: id,
    reason: text(4000),
    reservations: z.string().trim().max(4000, 'At most 4000 characters').default(''),
  }),
  reply: comparisonSchema,
});
