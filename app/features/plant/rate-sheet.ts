import { parseNumber } from '#app/lib/parse-number.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';
import { rateSchema } from '#sim-core/spec/rate-schema.ts';

/** The rates of one table while they are edited. */
export interface RateSheet<Name extends string> {
  /** as typed */
  readonly typed: Readonly<Record<Name, string>>;
  /** as they last made sense: what the pictures show while somebody types */
  readonly values: Readonly<Record<Name, number>>;
}
type RateTable<Name extends string> = Readonly<Record<Name, Parameter>>;
export type SheetErrors<Name extends string> = Partial<Record<Name, string>>;

export const startSheet = <Name extends string>(values: Readonly<Record<Name, number>>): RateSheet<Name> => ({
  typed: Object.fromEntries(
    Object.entries<number>(values).map(([name, value]) => [name, String(value)]),
  ) as Record<Name, string>,
  values,
});

export function typeRate<Name extends string>(
  table: RateTable<Name>,
  sheet: RateSheet<Name>,
  name: NoInfer<Name>,
  text: string,
): RateSheet<Name> {
  const value = parseNumber(text);
  const { min, max } = table[name];
  const fits = value !== undefined && value >= min && value <= max;
  return {
    typed: { ...sheet.typed, [name]: text },
    values: fits ? { ...sheet.values, [name]: value } : sheet.values,
  };
}

/** What is wrong, by rate: outside its range, or no number. */
export function sheetErrors<Name extends string>(
  table: RateTable<Name>,
  { typed }: RateSheet<Name>,
): SheetErrors<Name> {
  const read = rateSchema(table).safeParse(
    Object.fromEntries(
      Object.entries<string>(typed).map(([name, text]) => [name, parseNumber(text) ?? text]),
    ),
  );
  const errors: SheetErrors<Name> = {};
  for (const issue of read.error?.issues ?? []) {
    const name = issue.path[0] as Name;
    errors[name] = `Found “${typed[name].trim()}”. ${issue.message}`;
  }
  return errors;
}
