import type { QueryClient } from '@tanstack/react-query';
import { uploadLayer } from '#contract/ground.ts';
import { type LayerPart } from '#contract/layers.ts';
import { type Site } from '#contract/sites.ts';
import { callEndpoint, type Progress } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

/** Sends one GeoTIFF to play a part on a site. @throws ProblemError what is wrong with the raster */
export async function sendLayer(
  queryClient: QueryClient,
  siteId: string,
  upload: {
    file: File;
    part: LayerPart;
    onProgress: (progress: Progress) => void;
    signal: AbortSignal;
  },
): Promise<Site> {
  const { part, ...input } = upload;
  const site = await callEndpoint(uploadLayer, { params: { siteId }, body: { part }, ...input });
  keepSite(queryClient, site);
  return site;
}
