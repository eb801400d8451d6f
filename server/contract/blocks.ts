import { z } from 'zod';

/** A piece of a printed text, in reading order: what a page, a PDF or a text file makes of it is its own affair. */
export const blockSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('heading'),
    level: z.union([z.literal(1), z.literal(2)]),
    text: z.string(),
  }),
  z.strictObject({ kind: z.literal('text'), text: z.string() }),
  z.strictObject({ kind: z.literal('list'), items: z.array(z.string()) }),
  z.strictObject({
    kind: z.literal('table'),
    caption: z.string(),
    head: z.array(z.string()),
    rows: z.array(z.array(z.string())),
    /** columns of numbers, which stand to the right; of long signs such as hashes, which may break anywhere */
    numbers: z.array(z.number().int()).default([]),
    signs: z.array(z.number().int()).default([]),
  }),
  /** the recovery curves of an outlook of the facts that the block goes with */
  z.strictObject({ kind: z.literal('curves'), outlook: z.number().int() }),
]);
export type Block = z.infer<typeof blockSchema>;
