import type { QueryClient } from '@tanstack/react-query';
import type { LayerPart } from '#contract/layers.ts';
import { createUpload, type Upload } from '#contract/uploads.ts';
import { callEndpoint, type Progress } from '#app/lib/api-client.ts';
import { keepUpload } from './uploads-query.ts';

/** Sends one file; what is in it is read afterwards, in the background. @throws ProblemError why it was not taken */
export async function sendUpload(
  queryClient: QueryClient,
  teamId: string,
  sending: {
    siteId: string | undefined;
    file: File;
    part: LayerPart | undefined;
    onProgress: (progress: Progress) => void;
    signal: AbortSignal;
  },
): Promise<Upload> {
  const { siteId, part, ...input } = sending;
  const upload = await callEndpoint(createUpload, { params: { teamId }, body: { siteId, part }, ...input });
  keepUpload(queryClient, upload);
  return upload;
}
