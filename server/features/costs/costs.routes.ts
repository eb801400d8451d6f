import { getCosts, setCosts } from '#contract/costs.ts';
import { roles, type Role } from '#contract/people.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { keepCosts, siteCosts } from './costs.service.ts';

/** Works are costed by whoever plans them. */
const planners: readonly Role[] = ['modeller', 'manager', 'admin'];

/** What works cost on a site, and the budget. */
export const costsRoutes = (services: Services): Route[] => [
  route(getCosts, { site: roles }, ({ params }) => siteCosts(services.dataSource.manager, params.siteId)),
  route(setCosts, { site: planners }, ({ params, body, person }) =>
    keepCosts(services, params.siteId, body, person.name),
  ),
];
