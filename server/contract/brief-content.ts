import { z } from 'zod';
import { blockSchema } from './blocks.ts';
import { decisionSchema } from './comparisons.ts';
import { id, instant, text } from './endpoint.ts';
import { gridSchema } from './grid.ts';

/** The parts of a brief's page. Each stands in it once; people say in which order and which are shown. */
export const briefParts = [
  'question',
  'answer',
  'maps',
  'cost',
  'sureness',
  'change',
  'decision',
  'cautions',
] as const;
export type BriefPart = (typeof briefParts)[number];
/** Parts that take the whole width of the page; the others stand two beside each other where they follow each other. */
export const wideParts: readonly BriefPart[] = ['question', 'answer', 'maps'];

const partSchema = z.strictObject({
  part: z.enum(briefParts),
  heading: text(80),
  /** paragraphs; a line that begins with a hyphen is an item of a list */
  words: z.string().trim().max(3000, 'At most 3000 characters'),
  shown: z.boolean(),
});
export type BriefPartText = z.infer<typeof partSchema>;

/** What people write in a brief. */
export const briefTextSchema = z.strictObject({
  title: text(160),
  parts: z
    .array(partSchema)
    .length(briefParts.length, `Expected each of the ${briefParts.length} parts once`)
    .superRefine((parts, context) => {
      if (new Set(parts.map(({ part }) => part)).size < parts.length)
        context.addIssue({ code: 'custom', message: 'Expected each part once' });
      const cautions = parts.findIndex(({ part, shown }) => part === 'cautions' && !shown);
      if (cautions >= 0)
        context.addIssue({
          code: 'custom',
          path: [cautions, 'shown'],
          message: 'The cautions are always printed; they may stand anywhere on the page',
        });
    }),
});
export type BriefText = z.infer<typeof briefTextSchema>;

const interval = z.object({ estimate: z.number(), low: z.number(), high: z.number() });

/** What an option came to under an outlook. */
const briefFiguresSchema = z.object({
  /** chance to close before the next drought, with its 95 % interval */
  chance: interval,
  /** futures by what came first */
  recovery: z.number().int(),
  drought: z.number().int(),
  neither: z.number().int(),
  /** years since the survey; null where more than half are open at the horizon */
  medianTime: z.number().nullable(),
  /** years to recovery, cut at the horizon */
  meanTime: interval,
  /** years that it recovers sooner than Wait, on the same luck; null for Wait and where Wait is not compared */
  sooner: interval.nullable(),
  best: interval,
  lostAgain: z.number().int(),
  /** mean covered area at the horizon, m² */
  covered: z.number(),
  /** share still open with its band, by years since the survey */
  curve: z.array(
    z.object({
      time: z.number(),
      events: z.number().int(),
      censored: z.number().int(),
      atRisk: z.number().int(),
      open: z.number(),
      standardError: z.number(),
      low: z.number(),
      high: z.number(),
    }),
  ),
});
export type BriefFigures = z.infer<typeof briefFiguresSchema>;

/** Everything of a brief that was computed, as it was when a version was made: nothing of it changes afterwards. */
export const briefFactsSchema = z.object({
  madeAt: instant,
  teamName: z.string(),
  siteName: z.string(),
  invented: z.boolean(),
  grid: gridSchema,
  crsName: z.string(),
  comparison: z.object({ id, name: z.string(), done: z.number().int() }),
  surveyYear: z.number().int(),
  years: z.number().int(),
  /** share of the reference cover that counts as closed */
  target: z.number(),
  droughtThreshold: z.number(),
  currency: z.string().nullable(),
  options: z.array(
    z.object({
      name: z.string(),
      wait: z.boolean(),
      cost: z.number().nullable(),
      /** its works in a line */
      works: z.string(),
      /** where works stand: shares of the map's width from the west and of its height from the north */
      places: z.array(z.tuple([z.number(), z.number()])),
      /** futures in its map of closing years; null where none is stored */
      mapFutures: z.number().int().nullable(),
    }),
  ),
  outlooks: z.array(z.object({ name: z.string(), words: z.string(), options: z.array(briefFiguresSchema) })),
  /** place of the option that the brief speaks of: the one decided for, else the likeliest to close in time */
  lead: z.number().int(),
  decision: decisionSchema.nullable(),
  cautions: z.array(z.string()),
  /** the words that follow from these figures */
  suggested: briefTextSchema,
  annex: z.array(blockSchema),
});
export type BriefFacts = z.infer<typeof briefFactsSchema>;
