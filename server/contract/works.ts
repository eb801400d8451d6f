import { z } from 'zod';
import { actionSchema, type Action } from '#sim-core/spec/run-spec.ts';
import { text } from './endpoint.ts';

/** Most works that one option, and so one run, may hold. */
export const mostWorks = 20_000;

/** Short and unique within its option; copies of an option keep it, so that two versions can be told apart work by work. */
export const workIdSchema = z
  .string()
  .regex(/^[A-Za-z0-9_-]{1,24}$/, 'Expected 1 to 24 letters, digits, hyphens or underscores');

const letters = '0123456789abcdefghijklmnopqrstuvwxyz';
/** An id for a new work or set: 10 random letters and digits, so that two people who add works at once do not collide. */
export function newWorkId(): string {
  const random = crypto.getRandomValues(new Uint8Array(10));
  return Array.from(random, (byte) => letters[byte % letters.length]).join('');
}

const marks = {
  id: workIdSchema.default(newWorkId),
  /** what people call it: on the map, in the table, on the crew's list */
  name: text(100).optional(),
  /** the set that it was laid with, one of the option's `sets` */
  set: workIdSchema.optional(),
};
/** What a work carries beside its action. */
export interface Marks {
  id: string;
  name?: string | undefined;
  set?: string | undefined;
}
/** One of the works of an option: an action of the RunSpec with what the page needs to tell it from the others. */
export type Work = Action & Marks;
/** As `Work`; where no id is given, one is made. */
export type WorkInput = Action & Partial<Marks>;

const marked = actionSchema.options.map((kind) => kind.extend(marks));
export const workSchema = z.discriminatedUnion(
  'kind',
  marked as [(typeof marked)[number], ...typeof marked],
) as unknown as z.ZodType<Work, z.input<typeof actionSchema> & Partial<Marks>>;

const points = z
  .array(z.tuple([z.number(), z.number()]))
  .min(2)
  .max(10_000);
/** How a pattern laid a set of works, so that it can be laid anew: its name, the seed, where, and its own parameters. */
export const laidSchema = z.strictObject({
  /** name of a pattern in `sim-core/plan` */
  pattern: z.string().min(1).max(40),
  seed: z.string().min(1).max(200),
  /** outline that it fills, or line that it follows; in the site's CRS, m */
  outline: points.optional(),
  parameters: z
    .record(z.string().min(1).max(40), z.union([z.number(), z.string().max(200), z.boolean()]))
    .refine((values) => Object.keys(values).length <= 40, 'At most 40 parameters'),
});

/** Works that were laid together; each of them names it by `set`. */
export const workSetSchema = z.strictObject({
  id: workIdSchema,
  name: text(100).optional(),
  laid: laidSchema,
});
export type WorkSet = z.infer<typeof workSetSchema>;

const repeated = (ids: readonly string[]) => {
  const seen = new Set<string>();
  return ids.findIndex((id) => seen.size === seen.add(id).size);
};
export const worksSchema = z
  .array(workSchema)
  .max(mostWorks, `At most ${mostWorks} works in one option`)
  .superRefine((works, context) => {
    const at = repeated(works.map((work) => work.id));
    if (at >= 0)
      context.addIssue({
        code: 'custom',
        path: [at, 'id'],
        message: `“${works[at].id}” is the id of another of the works; give each its own, or none`,
      });
  });
export const workSetsSchema = z
  .array(workSetSchema)
  .max(1000)
  .refine((sets) => repeated(sets.map((set) => set.id)) < 0, 'Each set may stand once');

/** What is drawn in an option: the works, and how those were laid that a pattern laid. */
export interface Drawing {
  works: Work[];
  sets: WorkSet[];
}
/** `works.N.set` must be one of `sets`. Returns the first that is not, or undefined. */
export const strayWork = ({ works, sets }: Drawing): number | undefined => {
  const known = new Set(sets.map((set) => set.id));
  const at = works.findIndex((work) => work.set !== undefined && !known.has(work.set));
  return at < 0 ? undefined : at;
};

/** The works as the engine takes them: actions of a RunSpec, in the same order. */
export const runActions = (works: readonly WorkInput[]): Action[] =>
  works.map((work) => {
    const action = { ...work };
    delete action.id;
    delete action.name;
    delete action.set;
    return action;
  });

/** Works of plain actions, numbered `w1`, `w2` …: for options that are made as a whole. */
export const worksOf = (actions: readonly Action[]): Work[] =>
  actions.map((action, i) => ({ ...action, id: `w${i + 1}` }));
