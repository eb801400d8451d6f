import type { Plant } from '#contract/sites.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { parameters, rateNames, type RateName, type Rates } from '#sim-core/spec/parameters.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { ratesSchema } from '#sim-core/spec/run-spec.ts';

/** A plant while it is edited: rates as typed, and the rates as they last made sense. */
export interface PlantDraft {
  readonly name: string;
  readonly typed: Readonly<Record<RateName, string>>;
  /** what the pictures show while somebody types */
  readonly rates: Rates;
}

/** The rates in the order in which they are asked for. */
export const rateGroups: readonly { title: string; note: string; names: readonly RateName[] }[] = [
  {
    title: 'Spread and growth',
    note: 'How fast an edge moves, and how fast ground fills behind it.',
    names: ['lateralSpread', 'fillRate', 'carryOver', 'seedlingRate', 'clumpsPerSquareMetre'],
  },
  {
    title: 'Losses',
    note: 'What dies in an ordinary year, and what a drought takes.',
    names: ['tolerance', 'droughtLoss', 'lossWidth', 'backgroundLoss'],
  },
  {
    title: 'Shelter and neighbours',
    note: 'What a refuge, exposure and neighbours change.',
    names: ['refugeShift', 'refugeGrowth', 'neighbourShift', 'crowding', 'exposureShift'],
  },
];

export const startPlant = ({ name, rates }: Plant): PlantDraft => ({
  name,
  typed: Object.fromEntries(rateNames.map((rate) => [rate, String(rates[rate])])) as PlantDraft['typed'],
  rates,
});

export function typeRate(draft: PlantDraft, rate: RateName, text: string): PlantDraft {
  const typed = { ...draft.typed, [rate]: text };
  const value = parseNumber(text);
  const { min, max } = parameters[rate];
  const fits = value !== undefined && value >= min && value <= max;
  return { ...draft, typed, rates: fits ? { ...draft.rates, [rate]: value } : draft.rates };
}

export type PlantErrors = Partial<Record<RateName | 'name', string>>;

/** What is wrong, by field: outside the range of a rate, or refused by the engine (`problems`, at `rates.<name>`). */
export function plantErrors(draft: PlantDraft, problems: readonly FieldProblem[]): PlantErrors {
  const errors: PlantErrors = {};
  for (const { field, message } of problems) {
    const rate = rateNames.find((name) => field === `rates.${name}`);
    if (rate) errors[rate] = message;
  }
  const read = ratesSchema.safeParse(
    Object.fromEntries(rateNames.map((rate) => [rate, parseNumber(draft.typed[rate]) ?? draft.typed[rate]])),
  );
  for (const issue of read.error?.issues ?? []) {
    const rate = rateNames.find((name) => name === issue.path[0]);
    if (rate) errors[rate] = `Found “${draft.typed[rate].trim()}”. ${issue.message}`;
  }
  if (draft.name.trim() === '') errors.name = 'Give the plant a name';
  return errors;
}
