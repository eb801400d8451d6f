import * as contract from '#contract/fits.ts';
import { roles, type Role } from '#contract/people.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { acceptFit } from './accept-fit.ts';
import { fitReply, listFits } from './fit-reply.ts';
import { deleteFit, putFitState, resumeFit, startFit, stopFit } from './fit.service.ts';

/** Whoever sets the rates fits them. */
const fitters: readonly Role[] = ['modeller', 'admin'];
/** Two generations of a thousand members with all their figures, and the first one whole. */
const stateLimit = 16 * 1024 * 1024;

/** Fits of rates to later surveys. */
export function fitRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;
  return [
    route(contract.listFits, { site: roles }, async ({ params }) => ({
      fits: await listFits(manager, params.siteId),
    })),
    route(contract.startFit, { site: fitters }, ({ params, body, person }) =>
      startFit(services, params.siteId, body, person.name),
    ),
    route(contract.getFit, { site: roles }, ({ params }) => fitReply(manager, params.siteId, params.fitId)),
    route(
      contract.putFitState,
      { site: fitters },
      ({ params, body }) => putFitState(services, params, body),
      { bodyLimit: stateLimit },
    ),
    route(contract.stopFit, { site: fitters }, ({ params }) => stopFit(services, params)),
    route(contract.resumeFit, { site: fitters }, ({ params }) => resumeFit(services, params)),
    route(contract.acceptFit, { site: fitters }, ({ params, person }) =>
      acceptFit(services, params, person.name),
    ),
    route(contract.deleteFit, { site: fitters }, ({ params }) => deleteFit(services, params)),
  ];
}
