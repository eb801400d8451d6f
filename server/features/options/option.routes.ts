import { roles, type Role } from '#contract/people.ts';
import * as contract from '#contract/sites.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { changeOption, createOption, deleteOption, listOptions } from './option.service.ts';

/** Options are drawn by whoever plans the works. */
const planners: readonly Role[] = ['modeller', 'manager', 'admin'];

/** 20,000 works, or a few fences with long outlines. */
const bodyLimit = 16 * 1024 * 1024;

/** What could be done on a site. */
export const optionRoutes = (services: Services): Route[] => [
  route(contract.listOptions, { site: roles }, async ({ params }) => ({
    options: await listOptions(services.dataSource.manager, params.siteId),
  })),
  route(
    contract.createOption,
    { site: planners },
    ({ params, body, person }) => createOption(services, params.siteId, body, person.name),
    { bodyLimit },
  ),
  route(
    contract.changeOption,
    { site: planners },
    ({ params, body, person }) => changeOption(services, params, body, person.name),
    { bodyLimit },
  ),
  route(contract.deleteOption, { site: planners }, ({ params }) =>
    deleteOption(services, params.siteId, params.optionId),
  ),
];
