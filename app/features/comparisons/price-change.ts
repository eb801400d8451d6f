import type { ComparisonPlan } from '#contract/comparisons.ts';
import type { SiteCosts } from '#contract/costs.ts';
import { formatMoney } from '#contract/format-money.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';

const priceNames: Record<'mound' | 'clump' | 'fenceMetre' | 'visit' | 'perYear' | 'budget', string> = {
  mound: 'a mound',
  clump: 'a clump',
  fenceMetre: 'a metre of fence',
  visit: 'a visit',
  perYear: 'every year',
  budget: 'the budget',
};

/**
 * Which prices a comparison stands on, and where those of today differ; empty where they are alike. What a comparison
 * shows stays with its own.
 */
export function priceChangeWords(
  { unitCosts, currency }: Pick<ComparisonPlan, 'unitCosts' | 'currency'>,
  today: SiteCosts | undefined,
): string {
  if (unitCosts === undefined)
    return currency === null
      ? ''
      : 'Prices and budget were not kept when this comparison began, so no budget is drawn; its costs are those of then.';
  if (unitCosts === null || !today || today.changedAt === null) return '';
  const now = today.costs;
  const amount = (value: number | null, costs: UnitCosts) =>
    value === null ? 'not set' : formatMoney(value, costs.currency);
  const changed = (Object.keys(priceNames) as (keyof typeof priceNames)[])
    .filter((key) => unitCosts[key] !== now[key] || unitCosts.currency !== now.currency)
    .map((key) => `${priceNames[key]} ${amount(now[key], now)} (then ${amount(unitCosts[key], unitCosts)})`);
  if (unitCosts.visitsPerYear !== now.visitsPerYear)
    changed.push(`visits in a year with works ${now.visitsPerYear} (then ${unitCosts.visitsPerYear})`);
  return changed.length === 0
    ? ''
    : `Costs and budget are those of when it began. Today differ: ${changed.join(', ')}. Start a comparison anew to compare at these.`;
}
