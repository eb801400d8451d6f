import * as contract from '#contract/ground.ts';
import { rasterForm, receivedRaster } from '#server/files/raster-form.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { keepers } from '../keepers.ts';
import { changeFeature, deleteFeature, deleteFeatureImport, importFeatures } from './feature.service.ts';

/** Bytes of a file of points and areas: it is read whole, beside the requests. */
const largestFile = 8 * 1024 * 1024;

/** Surveyed points and areas of a site. */
export function featureRoutes(services: Services): Route[] {
  const form = rasterForm(services.blobs, largestFile);
  return [
    route(
      contract.importFeatures,
      { site: keepers },
      ({ params, body, person, request }) =>
        importFeatures(services, params.siteId, body, { by: person.name, ...receivedRaster(request) }),
      { form },
    ),
    route(contract.changeFeature, { site: keepers }, ({ params, body }) =>
      changeFeature(services, params.siteId, params.featureId, body),
    ),
    route(contract.deleteFeature, { site: keepers }, ({ params }) =>
      deleteFeature(services, params.siteId, params.featureId),
    ),
    route(contract.deleteFeatureImport, { site: keepers }, ({ params }) =>
      deleteFeatureImport(services, params.siteId, params.importId),
    ),
  ];
}
