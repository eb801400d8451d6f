import { In } from 'typeorm';
import { PersonEntity } from '../database/entities/person.ts';
import { TeamEntity } from '../database/entities/team.ts';
import type { Manager } from '../database/manager.ts';

export const anyoneAt = (manager: Manager, emails: readonly string[]): Promise<boolean> =>
  manager.existsBy(PersonEntity, { email: In([...emails]) });

export const teamIdsNamed = async (manager: Manager, name: string): Promise<string[]> =>
  (await manager.findBy(TeamEntity, { name })).map((team) => team.id);

export async function renameTeam(manager: Manager, id: string, name: string): Promise<void> {
  await manager.update(TeamEntity, { id }, { name });
}

export async function deleteTeam(manager: Manager, id: string): Promise<void> {
  await manager.delete(TeamEntity, { id });
}
