import type { Comparison, ComparisonPlan } from '#contract/comparisons.ts';
import { csv } from '#contract/csv.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';

const places = (value: number | undefined, digits = 4): number | null =>
  value === undefined ? null : Number(value.toFixed(digits));

/** What each option comes to under each outlook, as CSV of RFC 4180; shares 0…1, intervals 95 %. */
export function answersCsv(comparison: Comparison, { outlooks }: ComparisonFigures): string {
  const { plan, decision } = comparison;
  return csv(
    [
      ...['outlook', 'option', 'chosen', 'futures', 'cost', 'currency'],
      ...['chance_before_drought', 'chance_low', 'chance_high', 'neither_by_horizon'],
      ...['median_years', 'mean_years', 'mean_years_low', 'mean_years_high', 'years_sooner_than_wait'],
      ...['best_share', 'best_low', 'best_high', 'lost_again'],
    ],
    outlooks.flatMap((outlook) =>
      outlook.options.map(({ summary, name, cost, yearsSooner, best, lostAgain }, i) => {
        const { share, neither } = summary.beforeDrought;
        const mean = summary.restrictedMean;
        return [
          ...[outlook.name, name, decision?.optionId === plan.options[i].optionId ? 'yes' : 'no'],
          ...[outlook.replicates, cost, plan.currency],
          ...[places(share?.estimate), places(share?.low), places(share?.high), neither],
          ...[places(summary.medianTime), places(mean?.estimate), places(mean?.low), places(mean?.high)],
          ...[places(yearsSooner), places(best.estimate), places(best.low), places(best.high), lostAgain],
        ];
      }),
    ),
  );
}

/** The recovery curves, a row a year from the survey on. */
export function recoveryCsv(plan: ComparisonPlan, { outlooks }: ComparisonFigures): string {
  const { surveyYear } = plan.common;
  return csv(
    ['outlook', 'option', 'year', 'recovered_share', 'low', 'high', 'open_before'],
    outlooks.flatMap((outlook) =>
      outlook.options.flatMap(({ name, summary }) =>
        summary.recovery.map(({ time, open, low, high, atRisk }) => [
          ...[outlook.name, name, surveyYear + time],
          ...[places(1 - open), places(1 - high), places(1 - low), atRisk],
        ]),
      ),
    ),
  );
}

/** Differences of pairs that share their luck. */
export const pairsCsv = ({ outlooks }: ComparisonFigures): string =>
  csv(
    [
      ...['outlook', 'option', 'than', 'pairs', 'years_sooner', 'low', 'high'],
      ...['chance_gained', 'chance_gained_low', 'chance_gained_high', 'sharper_by'],
    ],
    outlooks.flatMap((outlook) =>
      outlook.pairs.map(({ first, second, sooner, chanceGained }) => [
        ...[outlook.name, outlook.options[first].name, outlook.options[second].name, sooner.pairs],
        ...[places(sooner.estimate), places(sooner.low), places(sooner.high), places(chanceGained.estimate)],
        ...[places(chanceGained.low), places(chanceGained.high)],
        Number.isFinite(sooner.sharperBy) ? places(sooner.sharperBy) : null,
      ]),
    ),
  );
