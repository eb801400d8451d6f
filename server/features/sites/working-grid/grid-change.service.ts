import { randomUUID } from 'node:crypto';
import { gridSchema } from '#contract/grid.ts';
import { gridChangeSchema, type GridChange } from '#contract/working-grid.ts';
import type { GridChangeRow } from '#server/database/entities/grid-change.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { siteReply } from '../site-reply.ts';
import { gridOfFactor } from './cell-sizes.ts';
import {
  deleteGridChange,
  findGridChange,
  putGridChange,
  unfinishedGridChanges,
} from './grid-change.repository.ts';
import { performGridChange } from './perform-grid-change.ts';

const startChange = (services: Services, { siteId, id }: Pick<GridChangeRow, 'siteId' | 'id'>): void =>
  services.background.start(id, (progress) => performGridChange(services, siteId, id, progress));

/** Takes up again what an earlier process left unfinished. */
export async function resumeGridChanges(services: Services): Promise<void> {
  for (const row of await unfinishedGridChanges(services.dataSource.manager)) startChange(services, row);
}

/** The change of a site's grid that is under way or has failed; null when there is none. */
export async function gridChangeReply(
  { background }: Services,
  manager: Manager,
  siteId: string,
): Promise<GridChange | null> {
  const row = await findGridChange(manager, siteId);
  if (!row) return null;
  const { id, grid, state, problem, askedAt, askedBy } = row;
  const progress = (state === 'aligning' && background.progressOf(id)) || null;
  return {
    grid: readJson(gridSchema, grid),
    state: state === 'aligning' && !progress ? 'waiting' : gridChangeSchema.shape.state.parse(state),
    progress,
    problem,
    askedAt,
    askedBy,
  };
}

/**
 * Has all layers of a site aligned anew onto cells `factor` times as wide as its finest; then the site takes them at
 * once.
 * @throws ProblemError `conflict` when it has that grid or another change is under way
 */
export async function startGridChange(
  services: Services,
  siteId: string,
  factor: number,
  by: string,
): Promise<GridChange | null> {
  const row = await services.write(async (manager) => {
    const { grid, finestGrid } = await siteReply(manager, siteId);
    const wanted = gridOfFactor(finestGrid, factor);
    if (wanted.cellSize === grid.cellSize)
      throw new ProblemError('conflict', `The site has cells of ${grid.cellSize} m already.`);
    const present = await findGridChange(manager, siteId);
    if (present?.state === 'aligning')
      throw new ProblemError(
        'conflict',
        `${present.askedBy} has asked for other cells already, and that is under way. Wait for it, or stop it first.`,
      );
    const change: GridChangeRow = {
      siteId,
      id: randomUUID(),
      grid: JSON.stringify(wanted),
      state: 'aligning',
      attempts: 0,
      problem: null,
      askedAt: services.clock().toISOString(),
      askedBy: by,
    };
    await putGridChange(manager, change);
    return change;
  });
  startChange(services, row);
  return gridChangeReply(services, services.dataSource.manager, siteId);
}

/** Stops a change of the grid, or dismisses one that failed; the site is as it was. */
export async function cancelGridChange(services: Services, siteId: string): Promise<void> {
  const row = await services.write(async (manager) => {
    const present = await findGridChange(manager, siteId);
    await deleteGridChange(manager, siteId);
    return present;
  });
  if (row) await services.background.cancel(row.id);
}
