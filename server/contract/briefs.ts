import { z } from 'zod';
import { briefFactsSchema, briefTextSchema } from './brief-content.ts';
import { endpoint, id, instant, text } from './endpoint.ts';
import { emailSchema } from './people.ts';

export const briefSummarySchema = z.object({
  id,
  siteId: id,
  title: z.string(),
  comparisonName: z.string(),
  /** the newest version */
  version: z.number().int(),
  changedAt: instant,
  changedBy: z.string(),
  decided: z.boolean(),
  /** people to whom it was sent */
  sent: z.number().int(),
});
export type BriefSummary = z.infer<typeof briefSummarySchema>;

const versionLineSchema = z.object({
  version: z.number().int(),
  title: z.string(),
  at: instant,
  by: z.string(),
  /** pages of its PDF, and how many of them the brief itself takes */
  pages: z.number().int(),
  briefPages: z.number().int(),
  /** bytes of its PDF */
  bytes: z.number().int(),
});

/** A version of a brief, in full. */
export const briefSchema = z.object({
  id,
  siteId: id,
  /** null once the comparison was deleted */
  comparisonId: id.nullable(),
  version: z.number().int(),
  latest: z.number().int(),
  /** newest first */
  versions: z.array(versionLineSchema),
  text: briefTextSchema,
  facts: briefFactsSchema,
  /** whether the comparison has gone on, or was decided on, since the newest version's figures */
  comparisonMoved: z.boolean(),
});
export type Brief = z.infer<typeof briefSchema>;

export const deliveryStates = ['sending', 'sent', 'outbox', 'failed'] as const;
export const briefMessageSchema = z.object({
  id,
  version: z.number().int(),
  subject: z.string(),
  text: z.string(),
  attached: z.boolean(),
  sentAt: instant,
  sentBy: z.string(),
  recipients: z.array(
    z.object({
      address: z.string(),
      status: z.enum(deliveryStates),
      /** what the mail server said */
      error: z.string().nullable(),
    }),
  ),
});
export type BriefMessage = z.infer<typeof briefMessageSchema>;
/** Most people that one message goes to. */
export const mostRecipients = 20;

const siteParams = z.object({ siteId: id });
const params = siteParams.extend({ briefId: id });
const versionParams = params.extend({ version: z.coerce.number().int().min(1) });
const one = '/api/sites/:siteId/briefs/:briefId';
const version = `${one}/versions/:version`;

export const listBriefs = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/briefs',
  summary: 'The briefs of a site, the one changed last first',
  params: siteParams,
  reply: z.object({ briefs: z.array(briefSummarySchema) }),
});
export const makeBrief = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/briefs',
  summary: 'Make a brief of a comparison; its words follow from the figures',
  params: siteParams,
  body: z.strictObject({ comparisonId: id }),
  reply: briefSchema,
});
export const getBrief = endpoint({
  method: 'GET',
  path: one,
  summary: 'A brief in its newest version',
  params,
  reply: briefSchema,
});
export const deleteBrief = endpoint({
  method: 'DELETE',
  path: one,
  summary: 'Delete a brief that was sent to nobody',
  params,
});
export const copyBrief = endpoint({
  method: 'POST',
  path: `${one}/copies`,
  summary: 'Copy the newest version of a brief',
  params,
  reply: briefSchema,
});
export const saveBrief = endpoint({
  method: 'POST',
  path: `${one}/versions`,
  summary: 'Save a new version; refused when another one came meanwhile',
  params,
  body: z.strictObject({
    /** the version that was edited */
    base: z.number().int().min(1),
    text: briefTextSchema,
    /** `anew`: taken from the comparison as it is now; words that nobody changed follow them */
    figures: z.enum(['kept', 'anew']).default('kept'),
  }),
  reply: briefSchema,
});
export const getBriefVersion = endpoint({
  method: 'GET',
  path: version,
  summary: 'A version of a brief',
  params: versionParams,
  reply: briefSchema,
});
export const getBriefPdf = endpoint({
  method: 'GET',
  path: `${version}/brief.pdf`,
  summary: 'A version of a brief as PDF, page and annex',
  params: versionParams,
  replyKind: 'bytes',
  replyType: 'application/pdf',
});
export const getBriefMap = endpoint({
  method: 'GET',
  path: `${version}/maps/:option`,
  summary: 'The closing years of an option as a version prints them',
  params: versionParams.extend({ option: z.coerce.number().int().min(0) }),
  replyKind: 'bytes',
  replyType: 'image/png',
});
export const listBriefMessages = endpoint({
  method: 'GET',
  path: `${one}/messages`,
  summary: 'What was sent of a brief, newest first',
  params,
  reply: z.object({ messages: z.array(briefMessageSchema), mailServer: z.boolean() }),
});

// eslint-disable-next-line no-control-regex -- a line break in a subject would begin another header
const noControl = /^[^\u0000-\u001f\u007f]*$/;
export const sendBrief = endpoint({
  method: 'POST',
  path: `${one}/messages`,
  summary: 'Send a version of a brief by e-mail; the same key sends once',
  params,
  body: z.strictObject({
    /** made by the sender, once a message: repeating the request repeats nothing */
    key: id,
    version: z.number().int().min(1),
    to: z
      .array(emailSchema)
      .min(1, 'Name at least one person')
      .max(mostRecipients, `At most ${mostRecipients} people at once`)
      .refine((to) => new Set(to).size === to.length, 'Each address may stand once'),
    subject: text(200).regex(noControl, 'One line is expected'),
    text: text(10_000),
    /** the PDF goes with it; else a link for members of the team */
    attach: z.boolean(),
  }),
  reply: briefMessageSchema,
});
