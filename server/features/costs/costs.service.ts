import { currencyCodes, type SiteCosts } from '#contract/costs.ts';
import { unitCostsSchema, type UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { fieldProblem } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { findCosts, putCosts } from './costs.repository.ts';

/** Before anybody has set them: nothing costs anything, and there is no budget. */
const noCosts: UnitCosts = unitCostsSchema.parse({ currency: 'EUR' });

/** What works cost on a site, and the budget. */
export async function siteCosts(manager: Manager, siteId: string): Promise<SiteCosts> {
  const row = await findCosts(manager, siteId);
  if (!row) return { costs: noCosts, changedAt: null, changedBy: null };
  const { changedAt, changedBy } = row;
  return { costs: readJson(unitCostsSchema, row.costs), changedAt, changedBy };
}

/** Sets them. @throws ProblemError at `currency` where there is no such one */
export function keepCosts(
  services: Services,
  siteId: string,
  costs: UnitCosts,
  by: string,
): Promise<SiteCosts> {
  if (!currencyCodes.includes(costs.currency))
    throw fieldProblem(
      'currency',
      `“${costs.currency}” is no currency of ISO 4217; expected one such as EUR`,
    );
  return services.write(async (manager) => {
    const changedAt = services.clock().toISOString();
    await putCosts(manager, { siteId, costs: JSON.stringify(costs), changedAt, changedBy: by });
    return siteCosts(manager, siteId);
  });
}
