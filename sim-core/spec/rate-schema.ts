import { z } from 'zod';
import type { Parameter } from './parameters.ts';

/** Schema of the rates of a table: each a number within its range, at its default where it is left out. */
export function rateSchema<Name extends string>(
  table: Readonly<Record<Name, Parameter>>,
): z.ZodType<{ [name in Name]: number }, { [name in Name]?: number }> {
  const fields = Object.entries<Parameter>(table).map(([name, { min, max, unit, label, default: start }]) => {
    const said = `${label} must lie between ${min} and ${max} ${unit}`;
    return [name, z.number({ error: said }).min(min, said).max(max, said).default(start)];
  });
  return z.strictObject(
    Object.fromEntries(fields) as Record<Name, z.ZodDefault<z.ZodNumber>>,
  ) as unknown as z.ZodType<{ [name in Name]: number }, { [name in Name]?: number }>;
}
