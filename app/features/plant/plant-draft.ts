import type { Plant } from '#contract/sites.ts';
import { parameters, rateNames, type RateName } from '#sim-core/spec/parameters.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { processesSchema, type Processes } from '#sim-core/spec/processes.ts';
import {
  fragmentParameters,
  grazerParameters,
  type FragmentRates,
  type GrazerRates,
} from '#sim-core/spec/process-parameters.ts';
import { sheetErrors, startSheet, type RateSheet, type SheetErrors } from './rate-sheet.ts';

/** A plant while it is edited. */
export interface PlantDraft {
  readonly name: string;
  readonly rates: RateSheet<RateName>;
  readonly grazers: ProcessSheet<keyof GrazerRates>;
  readonly fragments: ProcessSheet<keyof FragmentRates>;
}

/** A process: what is typed stays while it is off. */
export interface ProcessSheet<Name extends string> extends RateSheet<Name> {
  readonly on: boolean;
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

const atDefaults = processesSchema.parse({ grazers: {}, fragments: {} }) as Required<Processes>;

export function startPlant({ name, rates, processes = {} }: Plant): PlantDraft {
  const { grazers, fragments } = processes;
  return {
    name,
    rates: startSheet(rates),
    grazers: { ...startSheet(grazers ?? atDefaults.grazers), on: grazers !== undefined },
    fragments: { ...startSheet(fragments ?? atDefaults.fragments), on: fragments !== undefined },
  };
}

export interface PlantErrors {
  readonly name?: string;
  readonly rates: SheetErrors<RateName>;
  readonly grazers: SheetErrors<keyof GrazerRates>;
  readonly fragments: SheetErrors<keyof FragmentRates>;
}

/**
 * What is wrong, by part and rate: outside its range, or refused by the engine (`problems`, at `rates.<name>` and
 * `processes.<part>.<name>`). Of a process that is off, nothing.
 */
export function plantErrors(draft: PlantDraft, problems: readonly FieldProblem[]): PlantErrors {
  const refused = <Name extends string>(field: string, names: readonly Name[]): SheetErrors<Name> =>
    Object.fromEntries(
      problems.flatMap((problem) => {
        const name = names.find((rate) => problem.field === `${field}.${rate}`);
        return name ? [[name, problem.message]] : [];
      }),
    ) as SheetErrors<Name>;
  const { rates, grazers, fragments } = draft;
  return {
    ...(draft.name.trim() === '' ? { name: 'Give the plant a name' } : {}),
    rates: { ...refused('rates', rateNames), ...sheetErrors(parameters, rates) },
    grazers: grazers.on
      ? {
          ...refused('processes.grazers', Object.keys(grazerParameters) as (keyof GrazerRates)[]),
          ...sheetErrors(grazerParameters, grazers),
        }
      : {},
    fragments: fragments.on ? sheetErrors(fragmentParameters, fragments) : {},
  };
}

export const wrongFields = ({ name, ...parts }: PlantErrors): number =>
  (name === undefined ? 0 : 1) +
  Object.values(parts).reduce((sum: number, errors: object) => sum + Object.keys(errors).length, 0);

/** The processes that are on, with their rates. */
export const processesOf = ({ grazers, fragments }: PlantDraft): Processes => ({
  ...(grazers.on ? { grazers: grazers.values } : {}),
  ...(fragments.on ? { fragments: fragments.values } : {}),
});

/** The plant as it is saved. */
export const plantOf = (draft: PlantDraft): Plant => ({
  name: draft.name.trim(),
  rates: draft.rates.values,
  processes: processesOf(draft),
});
