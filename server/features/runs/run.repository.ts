import type { Manager } from '#server/database/manager.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import { OptionEntity, type OptionRow } from '#server/database/entities/option.ts';
import { RunFrameEntity, type RunFrameRow } from '#server/database/entities/run-frame.ts';
import { RunLayerEntity } from '#server/database/entities/run-layer.ts';
import { layersByHash } from '#server/specs/site-layers.repository.ts';
import { RunEntity, type RunRow } from '#server/database/entities/run.ts';
import { SiteEntity, type SiteRow } from '#server/database/entities/site.ts';

export const findRun = (manager: Manager, id: string): Promise<RunRow | null> =>
  manager.findOneBy(RunEntity, { id });

export const findSite = (manager: Manager, id: string): Promise<SiteRow | null> =>
  manager.findOneBy(SiteEntity, { id });

export const findOption = (manager: Manager, siteId: string, id: string): Promise<OptionRow | null> =>
  manager.findOneBy(OptionEntity, { id, siteId });

/** The layers that a run stands on, in the order of their upload; of two with the same bytes, the later. */
export async function layersOfRun(manager: Manager, run: Pick<RunRow, 'id' | 'siteId'>): Promise<LayerRow[]> {
  const used = await manager.findBy(RunLayerEntity, { runId: run.id });
  return layersByHash(
    manager,
    run.siteId,
    used.map(({ hash }) => hash),
  );
}

export async function insertRun(manager: Manager, run: RunRow, layers: readonly string[]): Promise<void> {
  await manager.insert(RunEntity, run);
  for (const hash of new Set(layers)) await manager.insert(RunLayerEntity, { runId: run.id, hash });
}

export async function updateRun(manager: Manager, id: string, change: Partial<RunRow>): Promise<void> {
  await manager.update(RunEntity, { id }, change);
}

/** Deletes a run with its frames. Returns the hashes of the blobs that they referred to. */
export async function deleteRunRows(manager: Manager, run: RunRow): Promise<string[]> {
  const frames = await framesOfRun(manager, run.id);
  await manager.delete(RunEntity, { id: run.id });
  return [...frames.map((frame) => frame.hash), ...(run.closingHash ? [run.closingHash] : [])];
}

/** Ascending in years. */
export const framesOfRun = (manager: Manager, runId: string): Promise<RunFrameRow[]> =>
  manager.find(RunFrameEntity, { where: { runId }, order: { year: 'ASC' } });

export const findFrame = (manager: Manager, runId: string, year: number): Promise<RunFrameRow | null> =>
  manager.findOneBy(RunFrameEntity, { runId, year });

/** Stores the frame of a year, in the place of one that is there. */
export async function putFrameRow(manager: Manager, frame: RunFrameRow): Promise<void> {
  await manager.upsert(RunFrameEntity, frame, ['runId', 'year']);
}

/** What a list shows of a run: everything but the long columns. */
export type RunListRow = Omit<RunRow, 'spec' | 'grid' | 'result'> & { frames: number };

/** Newest first, with how many frames each has stored. */
export async function runsOfSite(
  manager: Manager,
  siteId: string,
  { offset, limit }: { offset: number; limit: number },
): Promise<{ runs: RunListRow[]; total: number }> {
  const total = await manager.countBy(RunEntity, { siteId });
  const rows = await manager.find(RunEntity, {
    where: { siteId },
    order: { startedAt: 'DESC', id: 'DESC' },
    skip: offset,
    take: limit,
    select: {
      id: true,
      siteId: true,
      optionId: true,
      optionName: true,
      name: true,
      status: true,
      crsName: true,
      seed: true,
      mode: true,
      surveyYear: true,
      years: true,
      recoveredYear: true,
      lostYear: true,
      digest: true,
      closingHash: true,
      closingBytes: true,
      startedAt: true,
      startedBy: true,
      check: true,
    },
  });
  const counts = await manager
    .createQueryBuilder(RunFrameEntity, 'frame')
    .select('frame.runId', 'runId')
    .addSelect('COUNT(*)', 'count')
    .where('frame.runId IN (:...ids)', { ids: rows.length ? rows.map((run) => run.id) : [''] })
    .groupBy('frame.runId')
    .getRawMany<{ runId: string; count: number }>();
  const frames = new Map(counts.map(({ runId, count }) => [runId, Number(count)]));
  return { runs: rows.map((run) => ({ ...run, frames: frames.get(run.id) ?? 0 })), total };
}
