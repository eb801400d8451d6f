import { queryOptions, type QueryClient } from '@tanstack/react-query';
import {
  addPlant,
  addPlantVersion,
  changePlant,
  copyPlant,
  getPlantVersion,
  listPlants,
  type LibraryPlant,
  type Plant,
} from '#contract/plants.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

const libraryKey = (teamId: string) => ['team', teamId, 'plants'] as const;

/** The profiles that a team keeps, by name. */
export const libraryQuery = (teamId: string) =>
  queryOptions({
    queryKey: libraryKey(teamId),
    queryFn: async ({ signal }) => (await callEndpoint(listPlants, { params: { teamId }, signal })).plants,
  });

/** A version of a profile as it was kept. */
export const fetchVersion = (teamId: string, plantId: string, version: number) =>
  callEndpoint(getPlantVersion, { params: { teamId, plantId, version } });

/** Where a plant is kept: as a new profile, or as the next version of one. */
export type KeepAs = { readonly kind: 'new' } | { readonly kind: 'version'; readonly of: LibraryPlant };

/** A profile is the same wherever the plant grows, so what was measured on the site stays there. */
export const keepInLibrary = (teamId: string, plant: Plant, as: KeepAs, note: string) => {
  const profile = { ...plant, fieldNumbers: {} };
  return as.kind === 'new'
    ? callEndpoint(addPlant, { params: { teamId }, body: { plant: profile, note } })
    : callEndpoint(addPlantVersion, {
        params: { teamId, plantId: as.of.id },
        body: { plant: profile, note, latest: as.of.versions[0].version },
      });
};

export const copyInLibrary = (teamId: string, plantId: string, name: string) =>
  callEndpoint(copyPlant, { params: { teamId, plantId }, body: { name } });

export const changeInLibrary = (
  teamId: string,
  plantId: string,
  change: { name?: string; archived?: boolean },
) => callEndpoint(changePlant, { params: { teamId, plantId }, body: change });

export const refetchLibrary = (queryClient: QueryClient, teamId: string): Promise<void> =>
  queryClient.invalidateQueries({ queryKey: libraryKey(teamId) });
