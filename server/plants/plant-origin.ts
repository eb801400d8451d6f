import { isDeepStrictEqual } from 'node:util';
import {
  plantOriginSchema,
  plantSchema,
  type KnownOrigin,
  type Plant,
  type PlantOrigin,
} from '#contract/plants.ts';
import { startingPlant } from '#contract/starting-plants.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { findPlant, findVersion, versionFacts } from './library.repository.ts';

/** The profile that an origin names, as it is and was; undefined where this team has none such. */
export async function profileOf(
  manager: Manager,
  teamId: string,
  origin: PlantOrigin,
): Promise<{ name: string; latest: number | null; plant: Plant } | undefined> {
  if (origin.kind === 'starting') {
    const found = startingPlant(origin.key);
    return found && { name: found.plant.name, latest: null, plant: found.plant };
  }
  const row = await findPlant(manager, teamId, origin.plantId);
  const version = row && (await findVersion(manager, row.id, origin.version));
  if (!version) return undefined;
  const [newest] = await versionFacts(manager, [row.id]);
  return { name: row.name, latest: newest.version, plant: readJson(plantSchema, version.plant) };
}

/** Where the plant of a site was taken from, and whether it was changed since; null where it was typed in on the site. */
export async function knownOrigin(
  manager: Manager,
  { teamId, plantOrigin }: Pick<SiteRow, 'teamId' | 'plantOrigin'>,
  plant: Plant,
): Promise<KnownOrigin | null> {
  if (plantOrigin === null) return null;
  const origin = readJson(plantOriginSchema, plantOrigin);
  const profile = await profileOf(manager, teamId, origin);
  if (!profile) return { origin, name: null, latest: null, changed: null };
  const { name, latest } = profile;
  return { origin, name, latest, changed: !isDeepStrictEqual(ofSpecies(plant), ofSpecies(profile.plant)) };
}

/** What a profile says of a plant wherever it grows: all but the site's own name for it and what was measured there. */
function ofSpecies({ rates, processes, beliefs, sources }: Plant) {
  // By way of JSON, which drops what is undefined.
  return JSON.parse(JSON.stringify({ rates, processes: processes ?? {}, beliefs, sources })) as unknown;
}
