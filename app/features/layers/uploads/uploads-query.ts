import { queryOptions, type QueryClient } from '@tanstack/react-query';
import {
  cancelUpload,
  dismissUpload,
  listUploads,
  placeUpload,
  retryUpload,
  setUploadChoices,
  type Upload,
  type UploadChoices,
} from '#contract/uploads.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

/** Work on these goes on without anybody; on the others somebody has to decide. */
const working: readonly Upload['state'][] = ['waiting', 'reading', 'aligning'];
export const isWorking = (upload: Pick<Upload, 'state'>): boolean => working.includes(upload.state);

const uploadsKey = (teamId: string, siteId: string | undefined) => ['uploads', teamId, siteId] as const;

/** Uploads of a site, or those that a site is yet to be made from; asked for again while work on one goes on. */
export const uploadsQuery = (teamId: string, siteId: string | undefined) =>
  queryOptions({
    queryKey: uploadsKey(teamId, siteId),
    queryFn: async ({ signal }) =>
      (await callEndpoint(listUploads, { params: { teamId }, query: { siteId }, signal })).uploads,
    refetchInterval: ({ state }) => (state.data?.some(isWorking) ? 700 : false),
  });

/** Puts what the server says of an upload into the list. */
export function keepUpload(queryClient: QueryClient, upload: Upload): void {
  changeList(queryClient, upload, (known) =>
    known.some(({ id }) => id === upload.id)
      ? known.map((each) => (each.id === upload.id ? upload : each))
      : [...known, upload],
  );
}

/** Changes the list at once; a list that was asked for before must not undo that, so it is asked for anew. */
function changeList(
  queryClient: QueryClient,
  { teamId, siteId }: Upload,
  change: (known: readonly Upload[]) => Upload[],
): void {
  const queryKey = uploadsKey(teamId, siteId ?? undefined);
  queryClient.setQueryData<Upload[]>(queryKey, (known = []) => change(known));
  void queryClient.invalidateQueries({ queryKey });
}

const paramsOf = ({ teamId, id: uploadId }: Upload) => ({ teamId, uploadId });

/** What can be done with an upload; each answers with the upload as it is then. */
export const uploadDeeds = {
  choose: (upload: Upload, choices: UploadChoices) =>
    callEndpoint(setUploadChoices, { params: paramsOf(upload), body: choices }),
  place: (upload: Upload) => callEndpoint(placeUpload, { params: paramsOf(upload) }),
  cancel: (upload: Upload) => callEndpoint(cancelUpload, { params: paramsOf(upload) }),
  retry: (upload: Upload) => callEndpoint(retryUpload, { params: paramsOf(upload) }),
};

/** Takes an upload off the list; the layer that it became stays. */
export async function dismiss(queryClient: QueryClient, upload: Upload): Promise<void> {
  await callEndpoint(dismissUpload, { params: paramsOf(upload) });
  changeList(queryClient, upload, (known) => known.filter(({ id }) => id !== upload.id));
}
