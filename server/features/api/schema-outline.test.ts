import { expect, test } from 'vitest';
import { z } from 'zod';
import { schemaOutline } from './schema-outline.ts';

const outline = (schema: z.ZodType) => schemaOutline(z.toJSONSchema(schema, { io: 'input' }));

test('objects, ranges, choices and what may be left out', () => {
  const schema = z.object({
    name: z.string().max(9),
    years: z.number().int().min(1).max(500).optional(),
    mode: z.enum(['counts', 'mean-field']).default('counts'),
    speed: z.number().gt(0),
    places: z.array(z.tuple([z.number(), z.number()])).max(3),
    note: z.string().nullable(),
  });
  expect(outline(schema)).toBe(`{
  name: text ≤ 9 characters
  years?: whole number 1 to 500
  mode?: "counts" | "mean-field", "counts" unless said
  speed: number from above 0
  places: list of [number, number] ≤ 3
  note: text | null
}`);
});

test('what has a name is told by it', () => {
  expect(schemaOutline({ $ref: '#/components/schemas/Site' })).toBe('→ Site');
});
