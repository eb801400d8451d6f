import type { DataSource } from 'typeorm';
import type { ScopeLookup } from '../middleware/access.ts';
import { RunEntity } from './entities/run.ts';
import { SiteEntity } from './entities/site.ts';

/** Finds the team that owns a site or a run. */
export function createScopeLookup(dataSource: DataSource): ScopeLookup {
  const teamOfSite = async (siteId: string) =>
    (await dataSource.getRepository(SiteEntity).findOne({ where: { id: siteId }, select: { teamId: true } }))
      ?.teamId;
  return {
    teamOfSite,
    async teamOfRun(runId) {
      const run = await dataSource
        .getRepository(RunEntity)
        .findOne({ where: { id: runId }, select: { siteId: true } });
      return run ? teamOfSite(run.siteId) : undefined;
    },
  };
}
