import { z } from 'zod';
import { allParameters, anyRateNames, processOf, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import { processesSchema, type Processes } from '#sim-core/spec/processes.ts';
import { ratesSchema } from '#sim-core/spec/run-spec.ts';
import { beliefsSchema, type Beliefs } from '#sim-core/spec/uncertain.ts';
import { endpoint, id, instant, text } from './endpoint.ts';

/** How well a rate is known, from the best to the least. A rate of which nothing is said is a starting value. */
export const howSure = [
  'measured here',
  'published for this species',
  'published for a relative',
  'expert guess',
] as const;
export type HowSure = (typeof howSure)[number];

/** Where a rate comes from. */
const rateSourceSchema = z.strictObject({
  sure: z.enum(howSure),
  /** citation, survey or reasoning, in words */
  source: z.string().trim().max(600, 'At most 600 characters'),
  /** lowest and highest value that the source gives, in the rate's unit */
  range: z
    .strictObject({ low: z.number().min(-1e9).max(1e9), high: z.number().min(-1e9).max(1e9) })
    .refine(({ low, high }) => low <= high, 'The low end comes first')
    .optional(),
});
export type RateSource = z.infer<typeof rateSourceSchema>;
export type RateSources = { [name in AnyRateName]?: RateSource };
const rateSourcesSchema = z.strictObject(
  Object.fromEntries(anyRateNames.map((name) => [name, rateSourceSchema.optional()])),
) as unknown as z.ZodType<RateSources, RateSources>;

const measured = z.strictObject({
  value: z.number().gt(0).max(1e4),
  /** half-width of what it may be off by, in the same unit: about two standard errors */
  plusMinus: z.number().min(0).max(1e4),
});
/** What was measured in the field, held against what the rates imply. */
const fieldNumbersSchema = z.strictObject({
  /** advance of a straight edge on good ground, m/yr */
  frontSpeed: measured.optional(),
  /** years in which good ground filled from 1 % cover to half full */
  yearsToHalf: measured.optional(),
});
export type FieldNumbers = z.infer<typeof fieldNumbersSchema>;

const plantFields = {
  name: text(100),
  rates: ratesSchema,
  /** what goes on beside spread and loss; nothing unless named */
  processes: processesSchema.optional(),
  /** laws of the rates that are not known exactly, those of processes that are on among them */
  beliefs: beliefsSchema.default({}),
  sources: rateSourcesSchema.default({}),
  fieldNumbers: fieldNumbersSchema.default({}),
};

/** A belief about a rate of a process that is off has nothing to hold for. */
function refuseIdleBeliefs(
  { beliefs, processes }: { beliefs: Beliefs; processes?: Processes | undefined },
  context: z.RefinementCtx,
): void {
  for (const name of anyRateNames) {
    const part = processOf(name);
    if (beliefs[name] && part && !processes?.[part])
      context.addIssue({
        code: 'custom',
        path: ['beliefs', name],
        message: `${allParameters[name].label} belongs to ${part}, which are off`,
      });
  }
}

/** A profile of rates: the value that a single run takes, what is believed where it is not known, and where it comes from. */
export const plantSchema = z.strictObject(plantFields).superRefine(refuseIdleBeliefs);
export type Plant = z.infer<typeof plantSchema>;
/** What may be left out of a plant that is sent. */
export type PlantInput = z.input<typeof plantSchema>;

/** A profile that a plant was taken from: one of the team's at a version, or one of the product's starting profiles. */
export const plantOriginSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('library'), plantId: id, version: z.number().int().min(1) }),
  z.strictObject({ kind: z.literal('starting'), key: z.string().max(40) }),
]);
export type PlantOrigin = z.infer<typeof plantOriginSchema>;

/** The plant of a site as it is set: `origin` where it was taken from a profile just now, null to forget that; else it stays. */
export const sitePlantSchema = z
  .strictObject({ ...plantFields, origin: plantOriginSchema.nullable().optional() })
  .superRefine(refuseIdleBeliefs);
export type SitePlant = z.infer<typeof sitePlantSchema>;

/** The same as a site shows it. */
export const knownOriginSchema = z.object({
  origin: plantOriginSchema,
  /** name of the profile; null where it is no longer there */
  name: z.string().nullable(),
  /** newest version of a team's profile */
  latest: z.number().int().nullable(),
  /** whether the site's plant differs from the profile now; null where the profile is gone */
  changed: z.boolean().nullable(),
});
export type KnownOrigin = z.infer<typeof knownOriginSchema>;

const versionFactsSchema = z.object({
  version: z.number().int(),
  note: z.string(),
  savedAt: instant,
  savedBy: z.string(),
});
export const libraryPlantSchema = z.object({
  id,
  name: z.string(),
  archived: z.boolean(),
  /** newest first; a version never changes */
  versions: z.array(versionFactsSchema).min(1),
});
export type LibraryPlant = z.infer<typeof libraryPlantSchema>;

const teamParams = z.object({ teamId: id });
const plantParams = z.object({ teamId: id, plantId: id });
const note = z.string().trim().max(500, 'At most 500 characters').default('');
const listReply = z.object({ plants: z.array(libraryPlantSchema) });
const one = '/api/teams/:teamId/plants/:plantId';

export const listPlants = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/plants',
  summary: 'The profiles of plants that a team keeps, by name',
  params: teamParams,
  reply: listReply,
});
export const addPlant = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/plants',
  summary: 'Keep a plant as a new profile',
  params: teamParams,
  body: z.strictObject({ plant: plantSchema, note }),
  reply: libraryPlantSchema,
});
export const addPlantVersion = endpoint({
  method: 'POST',
  path: `${one}/versions`,
  summary: 'Keep a plant as the next version of a profile',
  params: plantParams,
  body: z.strictObject({
    plant: plantSchema,
    note,
    /** newest version that the sender knows; refused when there is a newer one */
    latest: z.number().int().min(1),
  }),
  reply: libraryPlantSchema,
});
export const getPlantVersion = endpoint({
  method: 'GET',
  path: `${one}/versions/:version`,
  summary: 'A version of a profile',
  params: plantParams.extend({ version: z.coerce.number().int().min(1) }),
  reply: versionFactsSchema.extend({ plant: plantSchema }),
});
export const copyPlant = endpoint({
  method: 'POST',
  path: `${one}/copies`,
  summary: 'Copy the newest version of a profile as a new one',
  params: plantParams,
  body: z.strictObject({ name: text(100) }),
  reply: libraryPlantSchema,
});
export const changePlant = endpoint({
  method: 'PATCH',
  path: one,
  summary: 'Rename a profile, archive it or bring it back',
  params: plantParams,
  body: z.strictObject({ name: text(100).optional(), archived: z.boolean().optional() }),
  reply: libraryPlantSchema,
});
