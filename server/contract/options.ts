import { z } from 'zod';
import { endpoint, id, instant, text } from './endpoint.ts';
import { worksSchema, workSchema, workSetSchema, workSetsSchema } from './works.ts';

const name = text(100);
const note = z.string().trim().max(4000, 'At most 4000 characters');

/** Works on the ground. `Wait` has none, stands first, and can be neither changed, archived, moved nor deleted. */
export const optionSchema = z.object({
  id,
  siteId: id,
  name: z.string(),
  note: z.string(),
  wait: z.boolean(),
  /** put away: still there with its runs, listed apart, and not to be drawn on until it is brought back */
  archived: z.boolean(),
  works: z.array(workSchema),
  sets: z.array(workSetSchema),
  /** rises with each change of name, note, works or place in the archive; a change must name the one it was made on */
  revision: z.number().int(),
  changedAt: instant,
  changedBy: z.string(),
});
export type Option = z.infer<typeof optionSchema>;

const siteParams = z.object({ siteId: id });
const optionParams = z.object({ siteId: id, optionId: id });
const optionsReply = z.object({ options: z.array(optionSchema) });

export const listOptions = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/options',
  summary: 'The options of a site in their order, Wait first, archived ones among them',
  params: siteParams,
  reply: optionsReply,
});
export const createOption = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/options',
  summary: 'Add an option',
  params: siteParams,
  body: z.strictObject({
    name,
    note: note.default(''),
    works: worksSchema,
    sets: workSetsSchema.default([]),
  }),
  reply: optionSchema,
});
export const changeOption = endpoint({
  method: 'PATCH',
  path: '/api/sites/:siteId/options/:optionId',
  summary:
    'Change what is given of an option; refused with `conflict` when somebody changed it after `revision`',
  params: optionParams,
  body: z.strictObject({
    revision: z.number().int(),
    name: name.optional(),
    note: note.optional(),
    archived: z.boolean().optional(),
    works: worksSchema.optional(),
    sets: workSetsSchema.optional(),
  }),
  reply: optionSchema,
});
export const copyOption = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/options/:optionId/copies',
  summary: 'Copy an option as it is saved; the copy stands after it',
  params: optionParams,
  body: z.strictObject({ name }),
  reply: optionSchema,
});
export const deleteOption = endpoint({
  method: 'DELETE',
  path: '/api/sites/:siteId/options/:optionId',
  summary: 'Delete an option with its history; its runs stay',
  params: optionParams,
});
export const orderOptions = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/option-order',
  summary: 'Put the options of a site in order; every option but Wait is named once',
  params: siteParams,
  body: z.strictObject({ optionIds: z.array(id).max(10_000) }),
  reply: optionsReply,
});

/** One saved state of an option. */
export const optionRevisionSchema = z.object({
  revision: z.number().int(),
  changedAt: instant,
  changedBy: z.string(),
  /** what changed, in words */
  summary: z.string(),
  name: z.string(),
  works: z.number().int(),
  /** its works are still kept, so that it can be looked at and brought back */
  kept: z.boolean(),
});
export type OptionRevision = z.infer<typeof optionRevisionSchema>;
export const listRevisions = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/options/:optionId/history',
  summary: 'Who changed an option, when and how, newest first',
  params: optionParams,
  reply: z.object({ revisions: z.array(optionRevisionSchema) }),
});
const revisionParams = optionParams.extend({ revision: z.coerce.number().int().min(1) });
export const getRevision = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/options/:optionId/history/:revision',
  summary: 'An option as it was saved once; `gone` when its works are no longer kept',
  params: revisionParams,
  reply: optionSchema,
});
export const bringBackRevision = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/options/:optionId/history/:revision/bring-back',
  summary: 'Save an older name, note and works again, as the newest revision',
  params: revisionParams,
  body: z.strictObject({
    /** the newest revision that the caller has seen */
    onRevision: z.number().int(),
  }),
  reply: optionSchema,
});
