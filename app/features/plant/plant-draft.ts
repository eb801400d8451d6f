import type { Plant, PlantOrigin, RateSource, RateSources } from '#contract/plants.ts';
import { centralValue } from '#sim-core/index.ts';
import { allParameters, processOf, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import { parameters, rateNames, type RateName } from '#sim-core/spec/parameters.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { processesSchema, type Processes } from '#sim-core/spec/processes.ts';
import {
  fragmentParameters,
  grazerParameters,
  type FragmentRates,
  type GrazerRates,
} from '#sim-core/spec/process-parameters.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';
import { readBelief, startBelief, type BeliefDraft } from './belief-draft.ts';
import {
  fieldNumberErrors,
  fieldNumbersOf,
  startFieldNumbers,
  type FieldNumbersDraft,
} from './field-numbers-draft.ts';
import { sheetErrors, startSheet, typeRate, type RateSheet, type SheetErrors } from './rate-sheet.ts';

/** A plant while it is edited. */
export interface PlantDraft {
  readonly name: string;
  readonly beliefs: { readonly [name in AnyRateName]?: BeliefDraft };
  readonly sources: RateSources;
  readonly fieldNumbers: FieldNumbersDraft;
  /** the profile that it was taken from while it was edited; undefined: as the site has it */
  readonly origin: PlantOrigin | undefined;
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

export function startPlant(plant: Plant, origin?: PlantOrigin): PlantDraft {
  const { name, rates, processes = {}, beliefs, sources, fieldNumbers } = plant;
  const { grazers, fragments } = processes;
  return {
    name,
    beliefs: Object.fromEntries(Object.entries(beliefs).map(([rate, belief]) => [rate, startBelief(belief)])),
    sources,
    fieldNumbers: startFieldNumbers(fieldNumbers),
    origin,
    rates: startSheet(rates),
    grazers: { ...startSheet(grazers ?? atDefaults.grazers), on: grazers !== undefined },
    fragments: { ...startSheet(fragments ?? atDefaults.fragments), on: fragments !== undefined },
  };
}

/** The rates that processes which are off leave out of account drop out. */
const counts = (draft: PlantDraft, name: AnyRateName): boolean => {
  const part = processOf(name);
  return part === undefined || draft[part].on;
};

const sheetOf = (draft: PlantDraft, name: AnyRateName): RateSheet<AnyRateName> =>
  draft[processOf(name) ?? 'rates'] as RateSheet<AnyRateName>;

/**
 * The draft with another belief about a rate, or none. A belief that makes sense sets the value that a single run takes:
 * the mode of a triangular law, else the median, to four digits.
 */
export function believe(draft: PlantDraft, name: AnyRateName, belief: BeliefDraft | undefined): PlantDraft {
  const { [name]: before, ...others } = draft.beliefs;
  void before;
  if (!belief) return { ...draft, beliefs: others };
  const rate = allParameters[name];
  const read = readBelief(belief, rate).belief;
  const beliefs = { ...others, [name]: belief };
  if (!read) return { ...draft, beliefs };
  const value = Number(centralValue(read, rate).toPrecision(4));
  const sheet = typeRate(allParameters, sheetOf(draft, name), name, String(value));
  const part = processOf(name);
  return { ...draft, beliefs, [part ?? 'rates']: part ? { ...draft[part], ...sheet } : sheet };
}

/** The draft with another source of a rate, or none. */
export function tellSource(draft: PlantDraft, name: AnyRateName, source: RateSource | undefined): PlantDraft {
  const { [name]: before, ...others } = draft.sources;
  void before;
  return { ...draft, sources: source ? { ...others, [name]: source } : others };
}

/** The beliefs that make sense, of rates that count. */
export const beliefsOf = (draft: PlantDraft): Beliefs =>
  Object.fromEntries(
    (Object.entries(draft.beliefs) as [AnyRateName, BeliefDraft][]).flatMap(([name, belief]) => {
      const read = counts(draft, name) ? readBelief(belief, allParameters[name]).belief : undefined;
      return read ? [[name, read]] : [];
    }),
  );

export interface PlantErrors {
  readonly name?: string;
  readonly beliefs: { readonly [name in AnyRateName]?: Readonly<Record<string, string>> };
  readonly fieldNumbers: { readonly [name in keyof FieldNumbersDraft]?: string };
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
    beliefs: Object.fromEntries(
      (Object.entries(draft.beliefs) as [AnyRateName, BeliefDraft][]).flatMap(([name, belief]) => {
        const wrong = counts(draft, name) ? readBelief(belief, allParameters[name]).errors : undefined;
        return wrong ? [[name, wrong]] : [];
      }),
    ),
    fieldNumbers: fieldNumberErrors(draft.fieldNumbers),
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
  beliefs: beliefsOf(draft),
  sources: Object.fromEntries(
    Object.entries(draft.sources).map(([name, said]) => [name, { ...said, source: said.source.trim() }]),
  ),
  fieldNumbers: fieldNumbersOf(draft.fieldNumbers),
});
