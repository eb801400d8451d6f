import type { Comparison } from '#contract/comparisons.ts';
import { formatMoney } from '#contract/format-money.ts';
import { chanceSentence } from '#sim-core/compare/chance-words.ts';
import type { ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import { fewFuturesWords, summaryWords } from '#sim-core/compare/summary-words.ts';
import { formatDateTime, formatNumber } from '#app/lib/formats.ts';

/** A comparison and what was decided on it as plain text, to be copied, printed or filed. */
export function decisionText(
  { name, decision, plan }: Comparison,
  { outlooks }: ComparisonFigures,
  siteName: string,
): string {
  const { surveyYear, years, seed } = plan.common;
  const decided = decision
    ? [
        `Decided: ${decision.optionName}`,
        `By ${decision.decidedBy}, ${formatDateTime(decision.decidedAt)}`,
        '',
        `Reason: ${decision.reason}`,
        ...(decision.reservations ? [`Reservations: ${decision.reservations}`] : []),
      ]
    : ['Nothing is decided yet.'];
  const under = outlooks.flatMap((outlook) => {
    const said = [summaryWords(outlook), fewFuturesWords(outlook)].filter((words) => words !== undefined);
    return [
      '',
      `Under “${outlook.name}”, ${outlook.replicates} futures of each option`,
      ...said,
      ...outlook.options.map(({ name: option, cost, summary, yearsSooner, wait }) =>
        [
          `- ${option}${option === decision?.optionName ? ' (chosen)' : ''}${cost !== null && plan.currency ? `, ${formatMoney(cost, plan.currency)}` : ''}:`,
          chanceSentence(summary.beforeDrought),
          ...(wait
            ? []
            : [
                `On average ${formatNumber(Math.abs(yearsSooner), 1)} years ${yearsSooner < 0 ? 'later' : 'sooner'} than Wait.`,
              ]),
        ].join(' '),
      ),
    ];
  });
  return [
    `${name}: ${siteName}`,
    '',
    ...decided,
    ...under,
    '',
    `Simulated from ${surveyYear} to ${surveyYear + years} with the seed ${seed}; a year at or below an index of ${formatNumber(plan.droughtThreshold, 2)} counts as the next drought. Intervals are 95 %.`,
    'A simulation supports a decision; it is no permit, survey or engineering design. Follow local codes and licensed practice.',
    '',
  ].join('\n');
}
