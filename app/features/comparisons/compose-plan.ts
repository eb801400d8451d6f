import type { Comparison } from '#contract/comparisons.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import type { WeatherSource } from '#sim-core/spec/weather-source.ts';
import type { StartBody } from './change-comparison.ts';

/** Bytes of counts that the maps of a comparison may take in this tab: two a cell for closing, four for cover. */
const mapBudget = 400 * 1024 * 1024;
const bytesOfCell = 6;
const mostMapYears = 60;

/**
 * Years of which maps are kept: the survey's, so that what stood then is told from what closed later, and all after it if
 * they fit into memory, else as many as do, evenly spread, the last one among them.
 */
export function mapYears(surveyYear: number, years: number, cells: number, ensembles: number): number[] {
  const fit = Math.floor(mapBudget / (cells * bytesOfCell * ensembles));
  const count = Math.max(1, Math.min(years, mostMapYears - 1, fit - 1));
  return [
    surveyYear,
    ...Array.from({ length: count }, (_, i) => surveyYear + Math.round(((i + 1) * years) / count)),
  ];
}

const held = (index: number) => Math.round(Math.min(wettest, Math.max(driest, index)) * 100) / 100;

/** The same weather with every index higher (wetter) or lower (drier) by so much. */
export function shiftedWeather(source: WeatherSource, by: number): WeatherSource {
  if (typeof source === 'number') return held(source + by);
  if (Array.isArray(source)) return source.map((index) => held(index + by));
  switch (source.kind) {
    case 'series':
      return {
        ...source,
        values: source.values.map((entry) => ({ ...entry, value: held(entry.value + by) })),
      };
    case 'palmer-type':
      return {
        ...source,
        mean: held((source.mean ?? 0) + by),
        ...(source.start !== undefined && { start: held(source.start + by) }),
      };
    case 'renewal':
      return { ...source, depth: held(source.depth + by), between: held((source.between ?? 0) + by) };
  }
}

/** An option that is to be compared, with the run that it would be. */
export interface ComposedOption {
  readonly optionId: string;
  readonly cost: number | null;
  readonly spec: RunSpec;
}

export interface PlanChoices {
  readonly name: string;
  readonly options: readonly ComposedOption[];
  readonly outlooks: Comparison['plan']['outlooks'];
  readonly replicates: number;
  readonly stop: Comparison['plan']['stop'];
  readonly droughtThreshold: number;
  readonly currency: string | null;
  /** prices and budget of today; null where nobody has set any */
  readonly unitCosts: UnitCosts | null;
  readonly cells: number;
  /** what is believed of rates that are not known; none: every future takes the rates of a single run */
  readonly beliefs?: Beliefs | undefined;
}

/** What starts a comparison: the options' runs have all in common but their works. */
export function startBody(choices: PlanChoices): StartBody {
  const { options, outlooks, cells, beliefs = {}, ...rest } = choices;
  const uncertain = Object.keys(beliefs).length > 0 && { draws: choices.replicates, rates: beliefs };
  const [{ spec }] = options;
  const { version, mode, seed, surveyYear, years, stepsPerYear, boundary, rates, target, layers, processes } =
    spec;
  return {
    ...rest,
    common: {
      ...{ version, mode, seed, surveyYear, years, stepsPerYear, boundary, rates, target, layers },
      ...(processes && { processes }),
      ...(uncertain && { uncertain }),
    },
    options: options.map(({ optionId, cost }) => ({ optionId, cost })),
    outlooks: [...outlooks],
    mapYears: mapYears(surveyYear, years, cells, options.length * outlooks.length),
  };
}
