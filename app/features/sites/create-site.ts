import type { QueryClient } from '@tanstack/react-query';
import { type LayerPart } from '#contract/layers.ts';
import { createSite, type Site } from '#contract/sites.ts';
import { callEndpoint, type Progress } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

/** Makes a site from a GeoTIFF, whose cells become the working grid. @throws ProblemError what is wrong with it */
export async function sendSite(
  queryClient: QueryClient,
  teamId: string,
  input: {
    name: string;
    part: LayerPart;
    file: File;
    onProgress: (progress: Progress) => void;
    signal: AbortSignal;
  },
): Promise<Site> {
  const { name, part, ...rest } = input;
  const site = await callEndpoint(createSite, { params: { teamId }, body: { name, part }, ...rest });
  keepSite(queryClient, site);
  return site;
}
