import {
  BriefEntity,
  BriefMapEntity,
  BriefMessageEntity,
  BriefVersionEntity,
} from '#server/database/entities/brief.ts';
import type {
  BriefMapRow,
  BriefMessageRow,
  BriefRow,
  BriefVersionRow,
} from '#server/database/entities/brief.ts';
import { ComparisonEntity, type ComparisonRow } from '#server/database/entities/comparison.ts';
import {
  ComparisonLayerEntity,
  EnsembleMapEntity,
  ReplicateEntity,
} from '#server/database/entities/comparison-parts.ts';
import { SiteEntity, type SiteRow } from '#server/database/entities/site.ts';
import { TeamEntity } from '#server/database/entities/team.ts';
import type { Manager } from '#server/database/manager.ts';

export const findSite = (manager: Manager, id: string): Promise<SiteRow | null> =>
  manager.findOneBy(SiteEntity, { id });
export const teamName = async (manager: Manager, id: string): Promise<string> =>
  (await manager.findOneByOrFail(TeamEntity, { id })).name;
export const findComparison = (manager: Manager, siteId: string, id: string): Promise<ComparisonRow | null> =>
  manager.findOneBy(ComparisonEntity, { id, siteId });
/** JSON of the stored replicates of an ensemble, ascending. */
export const recordsOf = async (
  manager: Manager,
  comparisonId: string,
  option: number,
  outlook: number,
): Promise<string[]> =>
  (
    await manager.find(ReplicateEntity, {
      where: { comparisonId, option, outlook },
      order: { replicate: 'ASC' },
    })
  ).map(({ record }) => record);
/** Digests of the stored replicates in a comparison: how many there are tells whether it has gone on. */
export const countRecords = (manager: Manager, comparisonId: string): Promise<number> =>
  manager.countBy(ReplicateEntity, { comparisonId });
/** The closing maps of a comparison under its first outlook. */
export const closingMaps = (manager: Manager, comparisonId: string) =>
  manager.findBy(EnsembleMapEntity, { comparisonId, outlook: 0, map: 'closing' });
export const comparedLayers = async (manager: Manager, comparisonId: string): Promise<string[]> =>
  (await manager.findBy(ComparisonLayerEntity, { comparisonId })).map(({ hash }) => hash);

export const briefsOf = (manager: Manager, siteId: string): Promise<BriefRow[]> =>
  manager.findBy(BriefEntity, { siteId });
export const findBrief = (manager: Manager, siteId: string, id: string): Promise<BriefRow | null> =>
  manager.findOneBy(BriefEntity, { id, siteId });
/** Newest first. */
export const versionsOf = (manager: Manager, briefId: string): Promise<BriefVersionRow[]> =>
  manager.find(BriefVersionEntity, { where: { briefId }, order: { version: 'DESC' } });
export const findVersion = (
  manager: Manager,
  briefId: string,
  version: number,
): Promise<BriefVersionRow | null> => manager.findOneBy(BriefVersionEntity, { briefId, version });
export const mapsOf = (manager: Manager, briefId: string, version: number): Promise<BriefMapRow[]> =>
  manager.findBy(BriefMapEntity, { briefId, version });

export async function insertBrief(manager: Manager, row: BriefRow): Promise<void> {
  await manager.insert(BriefEntity, row);
}
/** Writes a version with its maps and makes it the newest. */
export async function insertVersion(
  manager: Manager,
  row: BriefVersionRow,
  maps: readonly Pick<BriefMapRow, 'option' | 'hash'>[],
): Promise<void> {
  const { briefId, version } = row;
  await manager.insert(BriefVersionEntity, row);
  for (const { option, hash } of maps)
    await manager.insert(BriefMapEntity, { briefId, version, option, hash });
  await manager.update(BriefEntity, { id: briefId }, { version });
}
/** Deletes a brief with its versions. Returns the hashes of the blobs that they referred to. */
export async function deleteBriefRows(manager: Manager, briefId: string): Promise<string[]> {
  const versions = await versionsOf(manager, briefId);
  const maps = await manager.findBy(BriefMapEntity, { briefId });
  await manager.delete(BriefEntity, { id: briefId });
  return [...versions.map(({ pdfHash }) => pdfHash), ...maps.map(({ hash }) => hash)];
}

/** Newest first. */
export const messagesOf = (manager: Manager, briefId: string): Promise<BriefMessageRow[]> =>
  manager.find(BriefMessageEntity, { where: { briefId }, order: { sentAt: 'DESC' } });
export const findMessage = (
  manager: Manager,
  briefId: string,
  key: string,
): Promise<BriefMessageRow | null> => manager.findOneBy(BriefMessageEntity, { briefId, key });
export async function insertMessage(manager: Manager, row: BriefMessageRow): Promise<void> {
  await manager.insert(BriefMessageEntity, row);
}
export async function updateRecipients(manager: Manager, id: string, recipients: string): Promise<void> {
  await manager.update(BriefMessageEntity, { id }, { recipients });
}
/** Messages that an earlier process was in the middle of sending. */
export const messagesAtWork = (manager: Manager): Promise<BriefMessageRow[]> =>
  manager
    .createQueryBuilder(BriefMessageEntity, 'm')
    .where(`m.recipients LIKE '%"status":"sending"%'`)
    .getMany();
/** Recipients of all briefs of a site's team since an instant. */
export async function recipientsSince(manager: Manager, teamId: string, since: string): Promise<number> {
  const rows = await manager
    .createQueryBuilder(BriefMessageEntity, 'm')
    .innerJoin(BriefEntity.options.name, 'b', 'b.id = m.briefId')
    .innerJoin(SiteEntity.options.name, 's', 's.id = b.siteId')
    .where('s.teamId = :teamId AND m.sentAt >= :since', { teamId, since })
    .select('m.recipients', 'recipients')
    .getRawMany<{ recipients: string }>();
  return rows.reduce((sum, { recipients }) => sum + (JSON.parse(recipients) as unknown[]).length, 0);
}
