import { randomUUID } from 'node:crypto';
import { In, MoreThan, type EntityManager } from 'typeorm';
import type { Role } from '#contract/people.ts';
import { InviteEntity, type Invite } from '#server/database/entities/invite.ts';
import { MembershipEntity } from '#server/database/entities/membership.ts';
import { PersonEntity } from '#server/database/entities/person.ts';
import { TeamEntity } from '#server/database/entities/team.ts';

export interface NewInvite {
  teamId: string;
  email: string;
  role: Role;
  tokenHash: string;
  sentAt: string;
  expiresAt: string;
  invitedById: string;
}

/** Adds an invite; one to the same address and team that was sent before stops working. */
export async function replaceInvite(manager: EntityManager, invite: NewInvite): Promise<Invite> {
  const invites = manager.getRepository(InviteEntity);
  await invites.delete({ teamId: invite.teamId, email: invite.email });
  const row = { id: randomUUID(), ...invite };
  await invites.insert(row);
  return row;
}

/** The invites of a team that can still be accepted, the latest first, with the inviter's name. */
export async function listOpenInvites(manager: EntityManager, teamId: string, now: Date) {
  const rows = await manager.getRepository(InviteEntity).find({
    where: { teamId, expiresAt: MoreThan(now.toISOString()) },
    order: { sentAt: 'DESC', id: 'ASC' },
  });
  const inviters = rows.flatMap((row) => row.invitedById ?? []);
  const people = await manager.getRepository(PersonEntity).findBy({ id: In(inviters) });
  return rows.map((row) => ({
    ...row,
    invitedBy: people.find((person) => person.id === row.invitedById)?.name ?? 'a former member',
  }));
}

export const dropInvite = async (manager: EntityManager, teamId: string, id: string): Promise<boolean> =>
  (await manager.getRepository(InviteEntity).delete({ teamId, id })).affected === 1;

export async function isMemberByEmail(
  manager: EntityManager,
  teamId: string,
  email: string,
): Promise<boolean> {
  const person = await manager.getRepository(PersonEntity).findOneBy({ email });
  return (
    person !== null &&
    (await manager.getRepository(MembershipEntity).existsBy({ teamId, personId: person.id }))
  );
}

export const teamNameOf = async (manager: EntityManager, id: string): Promise<string> =>
  (await manager.getRepository(TeamEntity).findOneByOrFail({ id })).name;
