import { layerOf, layerSources } from '#contract/layer-sources.ts';
import { runActions, type WorkInput } from '#contract/works.ts';
import { valueUnitScale } from '#contract/layers.ts';
import { outlookWeather, type Outlook } from '#contract/outlooks.ts';
import type { Site } from '#contract/sites.ts';
import { gridProblems } from '#sim-core/run/grid-problems.ts';
import { fieldProblems, type FieldProblem } from '#sim-core/spec/problems.ts';
import { runSpecSchema, runSpecVersion, type Mode, type RunSpec } from '#sim-core/spec/run-spec.ts';

/** What the person who starts a run decides; everything else comes from the site and the option. */
export interface RunChoices {
  readonly mode: Mode;
  readonly seed: string;
  /** one of the site's outlooks; the main one unless said */
  readonly outlook?: Outlook;
  /** the future of an outlook that draws its weather, counted from 1; the listed years unless said */
  readonly future?: number | undefined;
  /** outlooks of a comparison say each for itself whether the plant's grazers come; then they are kept */
  readonly keepGrazers?: boolean;
}

/** Where a problem is mended: a page of the site, or the form itself. */
export type MendingPlace = 'ground' | 'plant' | 'outlook' | 'options' | 'form';

export interface CompositionProblem extends FieldProblem {
  readonly mend: MendingPlace;
}

export type Composition =
  | { readonly spec: RunSpec; readonly problems?: undefined }
  | { readonly spec?: undefined; readonly problems: readonly CompositionProblem[] };

/**
 * The RunSpec of an option on a site. Instead of a spec it returns everything that stands in the way,
 * each with the page where it is mended: what is missing, what the schema refuses, what the engine refuses.
 */
export function composeRunSpec(
  site: Site,
  option: { readonly works: readonly WorkInput[] },
  { mode, seed, keepGrazers = false, outlook = site.outlook, future }: RunChoices,
): Composition {
  const missing = missingGround(site);
  if (missing.length > 0) return { problems: missing };
  const { surveyYear, years, stepsPerYear, boundary } = outlook;
  const { droughtIndex, trend, losses, grazing } = outlookWeather(
    outlook,
    future === undefined ? 'single run' : 'ensemble',
  );
  const parsed = runSpecSchema.safeParse({
    version: runSpecVersion,
    mode,
    seed: seed.trim(),
    ...(future !== undefined && { replicate: future - 1 }),
    surveyYear,
    years,
    stepsPerYear,
    boundary,
    rates: site.plant.rates,
    processes:
      grazing === false && !keepGrazers
        ? { ...site.plant.processes, grazers: undefined }
        : site.plant.processes,
    droughtIndex,
    trend,
    losses,
    actions: runActions(option.works),
    layers: layerSources(site),
  });
  if (!parsed.success) return { problems: fieldProblems(parsed.error).map(placed) };
  const refused = gridProblems(parsed.data, site.grid);
  return refused.length > 0 ? { problems: refused.map(placed) } : { spec: parsed.data };
}

function missingGround(site: Site): CompositionProblem[] {
  const problems: CompositionProblem[] = [];
  const say = (field: string, message: string) => problems.push({ field, message, mend: 'ground' });
  const habitat = layerOf(site, 'habitat');
  if (!habitat)
    say('layers.capacity', 'There is no habitat layer, so nothing says where the plant can grow.');
  else if (!habitat.classes)
    say('layers.capacity', 'The habitat layer has no class table, so nothing says what each class can hold.');
  else if (habitat.classes.every((row) => row.capacity === 0))
    say('layers.capacity', 'No habitat class can hold the plant: give at least one a capacity above 0.');
  if (!layerOf(site, 'cover'))
    say('layers.cover', 'There is no cover layer, so nothing says what stands now.');
  for (const part of ['cover', 'exposure', 'refuge'] as const) {
    const layer = layerOf(site, part);
    const scale = layer && valueUnitScale[layer.unit];
    if (layer && scale && (layer.maximum * scale > 1 + 1e-6 || layer.minimum * scale < -1e-6))
      say(
        `layers.${part}`,
        `The ${part} layer holds ${layer.minimum} to ${layer.maximum}, which its unit does not turn into shares from 0 to 1.`,
      );
  }
  return problems;
}

const places: readonly [prefix: string, mend: MendingPlace][] = [
  ['layers', 'ground'],
  ['rates', 'plant'],
  ['processes', 'plant'],
  ['actions', 'options'],
  ['seed', 'form'],
  ['mode', 'form'],
  ['replicate', 'form'],
];

function placed(problem: FieldProblem): CompositionProblem {
  const mend = places.find(([prefix]) => problem.field.startsWith(prefix))?.[1] ?? 'outlook';
  return { ...problem, message: inWords(problem), mend };
}

/** Works are counted from 1 on the page, as in their table. */
function inWords({ field, message }: FieldProblem): string {
  const nth = /^actions\.(\d+)/.exec(field)?.[1];
  return nth === undefined ? message : `Number ${Number(nth) + 1} of the works: ${message}`;
}
