import { currencyCodes, getCosts, setCosts, type SiteCosts } from '#contract/costs.ts';
import { roles, type Role } from '#contract/people.ts';
import { unitCostsSchema, type UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { fieldProblem } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { findCosts, putCosts } from './costs.repository.ts';

/** Works are costed by whoever plans them. */
const planners: readonly Role[] = ['modeller', 'manager', 'admin'];

/** Before anybody has set them: nothing costs anything, and there is no budget. */
const noCosts: UnitCosts = unitCostsSchema.parse({ currency: 'EUR' });

/** What works cost on a site, and the budget. */
export const costsRoutes = (services: Services): Route[] => [
  route(getCosts, { site: roles }, ({ params }) => costsOf(services.dataSource.manager, params.siteId)),
  route(setCosts, { site: planners }, ({ params, body, person }) =>
    keepCosts(services, params.siteId, body, person.name),
  ),
];

async function costsOf(manager: Manager, siteId: string): Promise<SiteCosts> {
  const row = await findCosts(manager, siteId);
  if (!row) return { costs: noCosts, changedAt: null, changedBy: null };
  const { changedAt, changedBy } = row;
  return { costs: readJson(unitCostsSchema, row.costs), changedAt, changedBy };
}

function keepCosts(services: Services, siteId: string, costs: UnitCosts, by: string): Promise<SiteCosts> {
  if (!currencyCodes.includes(costs.currency))
    throw fieldProblem(
      'currency',
      `“${costs.currency}” is no currency of ISO 4217; expected one such as EUR`,
    );
  return services.write(async (manager) => {
    const changedAt = services.clock().toISOString();
    await putCosts(manager, { siteId, costs: JSON.stringify(costs), changedAt, changedBy: by });
    return costsOf(manager, siteId);
  });
}
