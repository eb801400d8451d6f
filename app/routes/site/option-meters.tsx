import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { SiteCosts } from '#contract/costs.ts';
import type { Work } from '#contract/works.ts';
import { costsOf } from '#sim-core/plan/costs.ts';
import type { ClosingSummary } from '#sim-core/plan/closing-tally.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { costsQuery } from '#app/features/options/costs/site-costs.ts';
import { BudgetRule } from '#app/features/options/quick-look/budget-rule.tsx';
import { ClosingMeter } from '#app/features/options/quick-look/closing-meter.tsx';
import { CostDetails } from '#app/features/options/quick-look/cost-details.tsx';
import type { QuickLookView } from '#app/features/options/quick-look/use-quick-look.ts';
import { useSite } from './use-site.ts';

/** A site's costs, once somebody has set them. */
export function useSetCosts(siteId: string): SiteCosts['costs'] | undefined {
  const { data } = useQuery(costsQuery(siteId));
  return data && data.changedAt !== null ? data.costs : undefined;
}

const closedBy = (summary: ClosingSummary | undefined) => summary?.closedBy.at(-1)?.area;

interface MetersProps {
  readonly works: readonly Work[];
  readonly view: QuickLookView;
}

function useCostSums({ works, view }: MetersProps) {
  const { site } = useSite();
  const { surveyYear, years } = site.outlook;
  const costs = useSetCosts(site.id);
  const { clumpsPerSquareMetre } = site.plant.rates;
  const sums = useMemo(
    () => costs && costsOf({ works, unitCosts: costs, surveyYear, years, clumpsPerSquareMetre }),
    [costs, works, surveyYear, years, clumpsPerSquareMetre],
  );
  const [withWorks, wait] = [closedBy(view.look?.summary), closedBy(view.wait)];
  return {
    ...{ costs, sums, lastYear: surveyYear + years },
    closed: withWorks !== undefined && wait !== undefined ? { works: withWorks, wait } : undefined,
  };
}

/** What an option would cost and when the ground would close with it, while it is drawn; always in view. */
export function OptionMeters(
  props: MetersProps & {
    /** how many of the works are only shown faint, not placed yet */
    faint: number;
    /** the ground is complete, so that a look comes */
    possible: boolean;
    /** works that stand on marsh already, in words; empty for none */
    standing: string;
  },
) {
  const { view, standing } = props;
  const { costs, sums, lastYear } = useCostSums(props);
  return (
    <>
      {props.faint > 0 && (
        <p role="status" className="text-note font-semibold">
          Counted in: {formatCounted(props.faint, 'work')} drawn pale on the map, not placed yet.
        </p>
      )}
      {sums && costs && <BudgetRule total={sums.total} budget={costs.budget} currency={sums.currency} />}
      {view.error ? (
        <ProblemNotice error={view.error} title="There is no quick look." className="mt-3" />
      ) : (
        props.possible && <ClosingMeter summary={view.look?.summary} wait={view.wait} lastYear={lastYear} />
      )}
      <p role="status" className="text-note text-ink-2 empty:hidden">
        {standing !== '' && `On marsh that stands already: ${standing}.`}
      </p>
    </>
  );
}

/** More of what it costs: by year, and by the hectare. */
export function OptionCosts(props: MetersProps) {
  const { sums, closed, lastYear } = useCostSums(props);
  return sums && sums.total > 0 ? <CostDetails costs={sums} {...{ closed, lastYear }} /> : null;
}
