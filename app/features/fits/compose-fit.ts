import type { Layer } from '#contract/layers.ts';
import { onSpan } from '#contract/outlooks.ts';
import type { SurveyedArea, SurveyedFront } from '#contract/fits.ts';
import type { Site } from '#contract/sites.ts';
import type { WorkInput } from '#contract/works.ts';
import type { Figure } from '#sim-core/spec/fit-figure.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';
import type { FittedRate } from '#sim-core/fit/fit-run.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';
import type { StartFitBody } from './change-fit.ts';

/** How much a fit takes: members of each generation, runs of the first, and at most. */
export const budgets = {
  quick: { population: 50, priorRuns: 200, mostRuns: 600 },
  usual: { population: 100, priorRuns: 500, mostRuns: 2500 },
  thorough: { population: 250, priorRuns: 1500, mostRuns: 10_000 },
} as const;
export type Budget = keyof typeof budgets;
/** Below this share that is kept, another generation would cost more than it tells (common practice, no source). */
const leastAcceptance = 0.03;

export interface FitChoices {
  readonly name: string;
  readonly seed: string;
  readonly resurveys: readonly Layer[];
  /** standard error of a map's covered area, as a share of it */
  readonly areaError: number;
  readonly areas: readonly SurveyedArea[];
  readonly fronts: readonly SurveyedFront[];
  readonly rates: readonly FittedRate[];
  /** the option whose works stood meanwhile; none of Wait */
  readonly works: readonly WorkInput[];
  readonly weather: 'record' | 'outlook';
  readonly budget: Budget;
}

/** The latest year of any survey; the survey's own where there is none. */
export const lastSurvey = (
  surveyYear: number,
  { resurveys, areas, fronts }: Pick<FitChoices, 'resurveys' | 'areas' | 'fronts'>,
): number =>
  Math.max(
    surveyYear,
    ...resurveys.map(({ year }) => year ?? surveyYear),
    ...areas.map(({ year }) => year),
    ...fronts.map(({ until }) => until),
  );

/** Whether the record tells the weather of every year between the surveys. */
export const recordCovers = ({ droughtRecord, outlook }: Site, lastYear: number): boolean =>
  droughtRecord !== null &&
  Array.from({ length: lastYear - outlook.surveyYear }, (_, i) => outlook.surveyYear + 1 + i).every((year) =>
    droughtRecord.years.some((known) => known.year === year),
  );

/**
 * The site as it went from its survey to the last resurvey: its outlook cut or stretched to these years, with the
 * recorded weather where that is wanted, and works of later years left out.
 */
export function betweenSurveys(
  site: Site,
  { weather, works, ...surveys }: Pick<FitChoices, 'weather' | 'works' | 'resurveys' | 'areas' | 'fronts'>,
): { site: Site; works: readonly WorkInput[] } {
  const { surveyYear } = site.outlook;
  const last = lastSurvey(surveyYear, surveys);
  const outlook = onSpan(site.outlook, { ...site.outlook, years: Math.max(1, last - surveyYear) });
  const recorded = weather === 'record' ? (site.droughtRecord?.years ?? []) : [];
  const droughtIndex = outlook.droughtIndex.map((index, i) => {
    const known = recorded.find(({ year }) => year === surveyYear + 1 + i)?.index ?? index;
    return Math.min(wettest, Math.max(driest, known));
  });
  // What was recorded has its trend in it.
  const trend = weather === 'record' ? null : outlook.trend;
  return {
    site: { ...site, outlook: { ...outlook, droughtIndex, trend } },
    works: works.filter((work) => work.year <= last),
  };
}

/**
 * What starts a fit. Rates of which something is believed but which are not fitted are drawn by each run.
 *
 * @param spec of `betweenSurveys`; @param figures what the surveys come to
 */
export function startFitBody(
  choices: FitChoices,
  spec: RunSpec,
  beliefs: Beliefs,
  figures: readonly Figure[],
): StartFitBody {
  const { name, resurveys, areaError, areas, fronts, rates, budget } = choices;
  // What each run has of its own, and what is said anew below.
  const base: Omit<RunSpec, 'replicate'> & { replicate?: number } = { ...spec };
  delete base.replicate;
  delete base.reportYears;
  delete base.uncertain;
  const others = Object.entries(beliefs).filter(([other]) => rates.every((rate) => rate.name !== other));
  return {
    name,
    base: {
      ...base,
      ...(others.length > 0 && {
        uncertain: { draws: budgets[budget].priorRuns, rates: Object.fromEntries(others) },
      }),
    },
    data: {
      maps: resurveys.map(({ hash, unit, year }) => ({ layer: hash, unit, year: year!, areaError })),
      areas: [...areas],
      fronts: [...fronts],
    },
    rates: rates.map(({ name: rate, belief }) => ({ name: rate, belief })),
    figures: [...figures],
    ...budgets[budget],
    leastAcceptance,
  };
}
