import type { QueryClient } from '@tanstack/react-query';
import type { Site } from '#contract/sites.ts';

/** A site as it was fetched last. Lists that belong to it (`runs`, `options`) stand under this key. */
export const siteKey = (siteId: string) => ['site', siteId] as const;
/** The sites of a team. */
export const teamSitesKey = (teamId: string) => ['team', teamId, 'sites'] as const;

/** After a change: the reply is what the site looks like now, and lists that count its layers are asked for again. */
export function keepSite(queryClient: QueryClient, site: Site): void {
  queryClient.setQueryData<Site>(siteKey(site.id), site);
  void queryClient.invalidateQueries({ queryKey: teamSitesKey(site.teamId) });
}
