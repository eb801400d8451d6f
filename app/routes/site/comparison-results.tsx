import { memo } from 'react';
import type { Comparison } from '#contract/comparisons.ts';
import type { ComparisonFigures, OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import type { SiteCosts } from '#contract/costs.ts';
import { priceChangeWords } from '#app/features/comparisons/price-change.ts';
import { CostGain } from '#app/features/comparisons/cost-gain.tsx';
import { FuturesLines } from '#app/features/comparisons/futures-lines.tsx';
import { LossTable } from '#app/features/comparisons/loss-table.tsx';
import { OptionAnswers } from '#app/features/comparisons/option-answers.tsx';
import { OutlookTable } from '#app/features/comparisons/outlook-table.tsx';
import { PairTable } from '#app/features/comparisons/pair-table.tsx';
import { RecoveryCurves } from '#app/features/comparisons/recovery-curves.tsx';
import { WeightsBox } from '#app/features/comparisons/weights-box.tsx';
import { FutureAlone } from './future-alone.tsx';

/** What the futures of a comparison say, option by option and pair by pair; drawn again only with other figures. */
export const ComparisonAnswers = memo(function ComparisonAnswers(props: {
  comparison: Comparison;
  outlook: number;
  figures: OutlookFigures;
  known: KnownRecords;
  chosen: number | undefined;
}) {
  const { comparison, outlook, known } = props;
  const { plan } = comparison;
  return (
    <OptionAnswers figures={props.figures} currency={plan.currency} chosen={props.chosen}>
      {(option) => (
        <FuturesLines
          plan={plan}
          name={plan.options[option].name}
          records={[...known[option][outlook].values()]}
        >
          {(record) => <FutureAlone {...{ comparison, option, outlook, record }} />}
        </FuturesLines>
      )}
    </OptionAnswers>
  );
});

export const ComparisonCharts = memo(function ComparisonCharts(props: {
  comparison: Comparison;
  figures: ComparisonFigures;
  shown: OutlookFigures;
  /** prices of today; undefined while they are fetched */
  today: SiteCosts | undefined;
  chosen: number | undefined;
}) {
  const { figures, shown, chosen } = props;
  const { plan } = props.comparison;
  return (
    <>
      <RecoveryCurves
        curves={shown.options.map(({ name, wait, summary }) => ({ name, wait, curve: summary.recovery }))}
        surveyYear={plan.common.surveyYear}
        years={plan.common.years}
        chosen={chosen}
      />
      {plan.currency !== null && shown.options.every(({ cost }) => cost !== null) ? (
        <div>
          <CostGain
            figures={shown}
            currency={plan.currency}
            budget={plan.unitCosts?.budget ?? null}
            chosen={chosen}
          />
          <p className="mt-1 text-note text-ink-2 empty:hidden">{priceChangeWords(plan, props.today)}</p>
        </div>
      ) : (
        <p className="text-note text-ink-2">
          Cost against gain needs unit costs: set them on Options, then start a comparison anew.
        </p>
      )}
      <PairTable figures={shown} chosen={chosen} />
      <div className="grid content-start gap-8">
        <OutlookTable figures={figures} chosen={chosen} />
        <LossTable figures={shown} chosen={chosen} />
      </div>
      <WeightsBox figures={figures} />
    </>
  );
});
