import * as contract from '#contract/options.ts';
import { roles, type Role } from '#contract/people.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { getRevision, listRevisions } from './option-history.service.ts';
import {
  bringBackRevision,
  changeOption,
  copyOption,
  createOption,
  deleteOption,
  listOptions,
  orderOptions,
} from './option.service.ts';

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
  route(contract.copyOption, { site: planners }, ({ params, body, person }) =>
    copyOption(services, params, body.name, person.name),
  ),
  route(contract.deleteOption, { site: planners }, ({ params }) => deleteOption(services, params)),
  route(contract.orderOptions, { site: planners }, async ({ params, body }) => ({
    options: await orderOptions(services, params.siteId, body.optionIds),
  })),
  route(contract.listRevisions, { site: roles }, async ({ params }) => ({
    revisions: await listRevisions(services.dataSource.manager, params.siteId, params.optionId),
  })),
  route(contract.getRevision, { site: roles }, ({ params }) =>
    getRevision(services.dataSource.manager, params),
  ),
  route(contract.bringBackRevision, { site: planners }, ({ params, body, person }) =>
    bringBackRevision(services, params, body.onRevision, person.name),
  ),
];
