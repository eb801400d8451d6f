import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { SiteCosts } from '#contract/costs.ts';
import type { Work } from '#contract/works.ts';
import { costsOf } from '#sim-core/plan/costs.ts';
import type { ClosingSummary } from '#sim-core/plan/closing-tally.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { costsQuery } from '#app/features/options/costs/site-costs.ts';
import { ClosingMeter } from '#app/features/options/quick-look/closing-meter.tsx';
import { CostMeter } from '#app/features/options/quick-look/cost-meter.tsx';
import type { QuickLookView } from '#app/features/options/quick-look/use-quick-look.ts';
import { useSite } from './use-site.ts';

/** A site's costs, once somebody has set them. */
export function useSetCosts(siteId: string): SiteCosts['costs'] | undefined {
  const { data } = useQuery(costsQuery(siteId));
  return data && data.changedAt !== null ? data.costs : undefined;
}

const closedBy = (summary: ClosingSummary | undefined) => summary?.closedBy.at(-1)?.area;

/** What an option would cost and when the ground would close with it, while it is drawn. */
export function OptionMeters(props: {
  works: readonly Work[];
  /** how many of the works are only shown faint, not placed yet */
  faint: number;
  view: QuickLookView;
  /** the ground is complete, so that a look comes */
  possible: boolean;
}) {
  const { works, view, possible } = props;
  const { site } = useSite();
  const { surveyYear, years } = site.outlook;
  const costs = useSetCosts(site.id);
  const { clumpsPerSquareMetre } = site.plant.rates;
  const sums = useMemo(
    () => costs && costsOf({ works, unitCosts: costs, surveyYear, years, clumpsPerSquareMetre }),
    [costs, works, surveyYear, years, clumpsPerSquareMetre],
  );
  const [withWorks, wait] = [closedBy(view.look?.summary), closedBy(view.wait)];
  return (
    <>
      {props.faint > 0 && (
        <p role="status" className="text-note font-semibold">
          With the {formatCounted(props.faint, 'faint work')} that {props.faint === 1 ? 'is' : 'are'} not
          placed yet:
        </p>
      )}
      {sums && costs && (
        <CostMeter
          costs={sums}
          budget={costs.budget}
          closed={withWorks !== undefined && wait !== undefined ? { works: withWorks, wait } : undefined}
          lastYear={surveyYear + years}
        />
      )}
      {view.error ? (
        <ProblemNotice error={view.error} title="There is no quick look." className="mt-3" />
      ) : (
        possible && (
          <ClosingMeter summary={view.look?.summary} wait={view.wait} lastYear={surveyYear + years} />
        )
      )}
    </>
  );
}
