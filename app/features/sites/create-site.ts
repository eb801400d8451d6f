import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { makeSiteFromUpload } from '#contract/uploads.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

/** Makes a site on the grid that an upload leads to; the upload becomes its first layer in the background. */
export const makeSiteMutation = (queryClient: QueryClient, teamId: string) =>
  mutationOptions({
    mutationFn: ({ uploadId, name }: { uploadId: string; name: string }) =>
      callEndpoint(makeSiteFromUpload, { params: { teamId, uploadId }, body: { name } }),
    onSuccess: (site) => {
      keepSite(queryClient, site);
      return queryClient.invalidateQueries({ queryKey: ['uploads', teamId] });
    },
  });
