import type { Work } from '#contract/works.ts';
import type { Site } from '#contract/sites.ts';
import { costsOf } from '#sim-core/plan/costs.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';

export interface OptionCost {
  readonly total: number;
  readonly budget: number | null;
  readonly currency: string;
}

/** What works cost on a site in all, to the horizon of its outlook. */
export function optionCost(
  { outlook, plant }: Pick<Site, 'outlook' | 'plant'>,
  unitCosts: UnitCosts,
  works: readonly Work[],
): OptionCost {
  const { total, currency } = costsOf({
    works,
    unitCosts,
    surveyYear: outlook.surveyYear,
    years: outlook.years,
    clumpsPerSquareMetre: plant.rates.clumpsPerSquareMetre,
  });
  return { total, currency, budget: unitCosts.budget };
}
