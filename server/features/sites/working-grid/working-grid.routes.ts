import { roles } from '#contract/people.ts';
import * as contract from '#contract/working-grid.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { keepers } from '../keepers.ts';
import { siteReply } from '../site-reply.ts';
import { cellSizesOf } from './cell-sizes.ts';
import { cancelGridChange, gridChangeReply, startGridChange } from './grid-change.service.ts';

/** The cells that a site works on. */
export function workingGridRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;
  return [
    route(contract.listCellSizes, { site: roles }, async ({ params }) => ({
      cellSizes: cellSizesOf(await siteReply(manager, params.siteId)),
    })),
    route(contract.getGridChange, { site: roles }, async ({ params }) => ({
      gridChange: await gridChangeReply(services, manager, params.siteId),
    })),
    route(contract.startGridChange, { site: keepers }, async ({ params, body, person }) => ({
      gridChange: await startGridChange(services, params.siteId, body.factor, person.name),
    })),
    route(contract.cancelGridChange, { site: keepers }, ({ params }) =>
      cancelGridChange(services, params.siteId),
    ),
  ];
}
