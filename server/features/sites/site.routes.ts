import * as contract from '#contract/sites.ts';
import { roles } from '#contract/people.ts';
import { receivedRaster, rasterForm } from '#server/files/raster-form.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { keepers } from './keepers.ts';
import { listSitesOf, siteReply } from './site-reply.ts';
import { createSite, deleteSite, renameSite, setPlant } from './site.service.ts';

/** Sites with their plant. */
export function siteRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;
  const form = rasterForm(services.blobs, services.config.uploadLimitBytes);
  return [
    route(contract.listSites, { team: roles }, async ({ params }) => ({
      sites: await listSitesOf(manager, params.teamId),
    })),
    route(
      contract.createSite,
      { team: keepers },
      ({ params, body, person, request }) =>
        createSite(services, {
          teamId: params.teamId,
          name: body.name,
          part: body.part,
          by: person.name,
          ...receivedRaster(request),
        }),
      { form },
    ),
    route(contract.getSite, { site: roles }, ({ params }) => siteReply(manager, params.siteId)),
    route(contract.renameSite, { site: keepers }, ({ params, body }) =>
      renameSite(services, params.siteId, body.name),
    ),
    route(contract.deleteSite, { site: keepers }, ({ params }) => deleteSite(services, params.siteId)),
    route(contract.setPlant, { site: keepers }, ({ params, body }) =>
      setPlant(services, params.siteId, body),
    ),
  ];
}
