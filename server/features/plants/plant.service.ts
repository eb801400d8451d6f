import { randomUUID } from 'node:crypto';
import { plantSchema, type LibraryPlant, type Plant } from '#contract/plants.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import {
  findPlant,
  findVersion,
  insertPlant,
  insertVersion,
  plantsOfTeam,
  updatePlant,
  versionFacts,
} from '#server/plants/library.repository.ts';

interface PlantAddress {
  teamId: string;
  plantId: string;
}
interface Kept {
  plant: Plant;
  note: string;
}

/** The profiles of a team, by name. */
export async function listPlants(manager: Manager, teamId: string): Promise<LibraryPlant[]> {
  const rows = await plantsOfTeam(manager, teamId);
  const facts = await versionFacts(
    manager,
    rows.map(({ id }) => id),
  );
  return rows.map(({ id, name, archived }) => ({
    id,
    name,
    archived,
    versions: facts
      .filter(({ plantId }) => plantId === id)
      .map(({ version, note, savedAt, savedBy }) => ({ version, note, savedAt, savedBy })),
  }));
}

/** @throws ProblemError `not-found` where the team has no such profile */
async function requirePlant(manager: Manager, { teamId, plantId }: PlantAddress): Promise<LibraryPlant> {
  const found = (await listPlants(manager, teamId)).find(({ id }) => id === plantId);
  if (!found) throw notFound();
  return found;
}

/** A version of a profile. @throws ProblemError `not-found` */
export async function plantVersion(manager: Manager, address: PlantAddress & { version: number }) {
  if (!(await findPlant(manager, address.teamId, address.plantId))) throw notFound();
  const found = await findVersion(manager, address.plantId, address.version);
  if (!found) throw notFound();
  const { version, note, savedAt, savedBy } = found;
  return { version, note, savedAt, savedBy, plant: readJson(plantSchema, found.plant) };
}

/** Keeps a plant as a new profile under its own name. */
export const addPlant = (services: Services, teamId: string, kept: Kept, by: string): Promise<LibraryPlant> =>
  services.write((manager) => insertProfile(services, manager, teamId, kept, by));

async function insertProfile(
  { clock }: Services,
  manager: Manager,
  teamId: string,
  { plant, note }: Kept,
  by: string,
): Promise<LibraryPlant> {
  const [plantId, savedAt] = [randomUUID(), clock().toISOString()];
  await insertPlant(manager, { id: plantId, teamId, name: plant.name, archived: false, createdAt: savedAt });
  const version = { plantId, version: 1, plant: JSON.stringify(plant), note, savedAt, savedBy: by };
  await insertVersion(manager, version);
  return requirePlant(manager, { teamId, plantId });
}

/** Keeps a plant as the next version. @throws ProblemError `conflict` when somebody saved a newer one meanwhile */
export const addPlantVersion = (
  services: Services,
  address: PlantAddress,
  { plant, note, latest }: Kept & { latest: number },
  by: string,
): Promise<LibraryPlant> =>
  services.write(async (manager) => {
    const [newest] = (await requirePlant(manager, address)).versions;
    if (newest.version !== latest)
      throw new ProblemError(
        'conflict',
        `${newest.savedBy} saved version ${newest.version} meanwhile; you have seen version ${latest}. Look at it, then save again, or keep yours as a new profile.`,
      );
    await insertVersion(manager, {
      plantId: address.plantId,
      version: latest + 1,
      plant: JSON.stringify(plant),
      note,
      savedAt: services.clock().toISOString(),
      savedBy: by,
    });
    return requirePlant(manager, address);
  });

/** A new profile from the newest version of another. */
export const copyPlant = (
  services: Services,
  address: PlantAddress,
  name: string,
  by: string,
): Promise<LibraryPlant> =>
  services.write(async (manager) => {
    const original = await requirePlant(manager, address);
    const [{ version }] = original.versions;
    const { plant } = await plantVersion(manager, { ...address, version });
    const note = `Copied from “${original.name}”, version ${version}`;
    return insertProfile(services, manager, address.teamId, { plant: { ...plant, name }, note }, by);
  });

export const changePlant = (
  services: Services,
  address: PlantAddress,
  change: { name?: string | undefined; archived?: boolean | undefined },
): Promise<LibraryPlant> =>
  services.write(async (manager) => {
    await requirePlant(manager, address);
    const { name, archived } = change;
    await updatePlant(manager, address.plantId, {
      ...(name !== undefined && { name }),
      ...(archived !== undefined && { archived }),
    });
    return requirePlant(manager, address);
  });
