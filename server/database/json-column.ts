import type { z } from 'zod';

/** Parses a JSON column by its schema: what was written by an older version must not slip through unread. */
export function readJson<S extends z.ZodType>(schema: S, text: string): z.output<S> {
  return schema.parse(JSON.parse(text));
}
