import { MoreThan, type EntityManager } from 'typeorm';
import { InviteEntity, type Invite } from '#server/database/entities/invite.ts';
import { MembershipEntity } from '#server/database/entities/membership.ts';
import { TeamEntity } from '#server/database/entities/team.ts';
import { hashToken } from '#server/people/tokens.ts';

/** The invite of a token with its team's name, while it can be accepted. */
export async function findOpenInvite(
  manager: EntityManager,
  token: string,
  now: Date,
): Promise<(Invite & { teamName: string }) | undefined> {
  const invite = await manager
    .getRepository(InviteEntity)
    .findOneBy({ tokenHash: hashToken(token), expiresAt: MoreThan(now.toISOString()) });
  if (!invite) return undefined;
  const team = await manager.getRepository(TeamEntity).findOneByOrFail({ id: invite.teamId });
  return { ...invite, teamName: team.name };
}

/** Uses an invite up; false when somebody else did so first. */
export const useInvite = async (manager: EntityManager, id: string): Promise<boolean> =>
  (await manager.getRepository(InviteEntity).delete({ id })).affected === 1;

export const isMember = (manager: EntityManager, teamId: string, personId: string): Promise<boolean> =>
  manager.getRepository(MembershipEntity).existsBy({ teamId, personId });
