import * as contract from '#contract/ground.ts';
import { roles } from '#contract/people.ts';
import { safeFileName } from '#server/files/file-name.ts';
import { rasterForm, receivedRaster } from '#server/files/raster-form.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { keepers } from './keepers.ts';
import { deleteLayer, layerDependents, layerHistory } from './layer-history.service.ts';
import { findLayerByHash, findLayerBySource } from './layer.repository.ts';
import { addLayer, changeLayer, setLayerClasses } from './layer.service.ts';
import { putLayerBack } from './put-layer-back.ts';
import { setElevationCurves } from './site.service.ts';

/** The layers of a site. */
export function layerRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;
  const form = rasterForm(services.blobs, services.config.uploadLimitBytes);
  return [
    route(
      contract.uploadLayer,
      { site: keepers },
      ({ params, body, person, request }) =>
        addLayer(services, params.siteId, { ...body, by: person.name, ...receivedRaster(request) }),
      { form },
    ),
    route(contract.changeLayer, { site: keepers }, ({ params, body }) =>
      changeLayer(services, params.siteId, params.layerId, body),
    ),
    route(contract.setClasses, { site: keepers }, ({ params, body }) =>
      setLayerClasses(services, params.siteId, params.layerId, body.classes),
    ),
    route(contract.deleteLayer, { site: keepers }, ({ params }) =>
      deleteLayer(services, params.siteId, params.layerId),
    ),
    route(contract.getLayerDependents, { site: roles }, ({ params }) =>
      layerDependents(manager, params.siteId, params.layerId),
    ),
    route(contract.getLayerHistory, { site: roles }, async ({ params, query }) => ({
      entries: await layerHistory(manager, params.siteId, query.part),
    })),
    route(contract.putLayerBack, { site: keepers }, ({ params }) =>
      putLayerBack(services, params.siteId, params.layerId),
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
    route(contract.getLayerFile, { site: roles }, async ({ params: { siteId, hash } }) => {
      const layer =
        (await findLayerByHash(manager, siteId, hash)) ?? (await findLayerBySource(manager, siteId, hash));
      if (!layer) throw notFound();
      const { stream, bytes } = await services.blobs.open(hash);
      const asItCame = hash === layer.sourceHash;
      return {
        bytes: stream,
        length: bytes,
        type: 'image/tiff',
        fileName: asItCame ? layer.fileName : safeFileName([layer.part, 'on the grid'], 'tif'),
        etag: hash,
        immutable: true,
      };
    }),
    route(contract.setElevationCurves, { site: keepers }, ({ params, body }) =>
      setElevationCurves(services, params.siteId, body),
    ),
  ];
}
