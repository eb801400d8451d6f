import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { deleteSite, renameSite, type Site } from '#contract/sites.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite, teamSitesKey } from '#app/lib/site-cache.ts';

export const renameSiteMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (name: string) => callEndpoint(renameSite, { params: { siteId }, body: { name } }),
    onSuccess: (site) => keepSite(queryClient, site),
  });

/** Deletes a site with its layers, options and runs. */
export const deleteSiteMutation = (queryClient: QueryClient, { id, teamId }: Pick<Site, 'id' | 'teamId'>) =>
  mutationOptions({
    mutationFn: () => callEndpoint(deleteSite, { params: { siteId: id } }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: teamSitesKey(teamId) }),
  });
