import { roles } from '#contract/people.ts';
import * as contract from '#contract/uploads.ts';
import { rasterForm, receivedRaster } from '#server/files/raster-form.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { keepers } from '../keepers.ts';
import { uploadReply } from './upload-reply.ts';
import {
  cancelUpload,
  createUpload,
  dismissUpload,
  listUploads,
  makeSiteFromUpload,
  placeUpload,
  requireUpload,
  retryUpload,
  setUploadChoices,
} from './upload.service.ts';

/** Rasters on their way to become layers. */
export function uploadRoutes(services: Services): Route[] {
  const manager = services.dataSource.manager;
  const form = rasterForm(services.blobs, services.config.uploadLimitBytes);
  return [
    route(
      contract.createUpload,
      { team: keepers },
      ({ params, body, person, request }) =>
        createUpload(services, params.teamId, { ...body, by: person.name, ...receivedRaster(request) }),
      { form },
    ),
    route(contract.listUploads, { team: roles }, async ({ params, query }) => ({
      uploads: await listUploads(services, params.teamId, query.siteId),
    })),
    route(contract.getUpload, { team: roles }, async ({ params }) =>
      uploadReply(services, manager, await requireUpload(manager, params.teamId, params.uploadId)),
    ),
    route(contract.getUploadThumbnail, { team: roles }, async ({ params }) => {
      const { thumbnailHash } = await requireUpload(manager, params.teamId, params.uploadId);
      if (thumbnailHash === null) throw notFound();
      const bytes = await services.blobs.read(thumbnailHash);
      return { bytes, type: 'application/octet-stream', etag: thumbnailHash };
    }),
    route(contract.setUploadChoices, { team: keepers }, ({ params, body }) =>
      setUploadChoices(services, params.teamId, params.uploadId, body),
    ),
    route(contract.placeUpload, { team: keepers }, ({ params }) =>
      placeUpload(services, params.teamId, params.uploadId),
    ),
    route(contract.makeSiteFromUpload, { team: keepers }, ({ params, body, person }) =>
      makeSiteFromUpload(services, params.teamId, params.uploadId, { name: body.name, by: person.name }),
    ),
    route(contract.cancelUpload, { team: keepers }, ({ params }) =>
      cancelUpload(services, params.teamId, params.uploadId),
    ),
    route(contract.retryUpload, { team: keepers }, ({ params }) =>
      retryUpload(services, params.teamId, params.uploadId),
    ),
    route(contract.dismissUpload, { team: keepers }, ({ params }) =>
      dismissUpload(services, params.teamId, params.uploadId),
    ),
  ];
}
