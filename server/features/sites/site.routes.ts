import * as contract from '#contract/sites.ts';
import { roles, type Role } from '#contract/people.ts';
import { receivedRaster, rasterForm } from '#server/files/raster-form.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { findLayerByHash } from './layer.repository.ts';
import { addLayer, changeLayerUnit, deleteLayer, setLayerClasses } from './layer.service.ts';
import { listSitesOf, siteReply } from './site-reply.ts';
import { createSite, deleteSite, renameSite, setOutlook, setPlant } from './site.service.ts';

/** Rasters, classes, plant and outlook are the modeller's. */
const keepers: readonly Role[] = ['modeller', 'admin'];

/** Sites and their layers. */
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
    route(
      contract.uploadLayer,
      { site: keepers },
      ({ params, body, person, request }) =>
        addLayer(services, params.siteId, { part: body.part, by: person.name, ...receivedRaster(request) }),
      { form },
    ),
    route(contract.changeLayer, { site: keepers }, ({ params, body }) =>
      changeLayerUnit(services, params.siteId, params.layerId, body.unit),
    ),
    route(contract.setClasses, { site: keepers }, ({ params, body }) =>
      setLayerClasses(services, params.siteId, params.layerId, body.classes),
    ),
    route(contract.deleteLayer, { site: keepers }, ({ params }) =>
      deleteLayer(services, params.siteId, params.layerId),
    ),
    route(contract.getLayerValues, { site: roles }, async ({ params }) => {
      const layer = await findLayerByHash(manager, params.siteId, params.hash);
      if (!layer) throw notFound();
      const { stream, bytes } = await services.blobs.open(layer.valuesHash);
      return {
        bytes: stream,
        length: bytes,
        type: 'application/octet-stream',
        etag: layer.valuesHash,
        immutable: true,
      };
    }),
    route(contract.setPlant, { site: keepers }, ({ params, body }) =>
      setPlant(services, params.siteId, body),
    ),
    route(contract.setOutlook, { site: keepers }, ({ params, body }) =>
      setOutlook(services, params.siteId, body),
    ),
  ];
}
