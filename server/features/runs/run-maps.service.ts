import type { Readable } from 'node:stream';
import { gridSchema } from '#contract/grid.ts';
import { frameYears, runSpecSchema } from '#sim-core/spec/run-spec.ts';
import type { RunRow } from '#server/database/entities/run.ts';
import { readJson } from '#server/database/json-column.ts';
import type { ReceivedFile } from '#server/files/blob-store.ts';
import { receiveCells } from '#server/files/receive-cells.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { fieldProblem, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { requireRun } from './run-reply.ts';
import { findFrame, putFrameRow, updateRun } from './run.repository.ts';

/** What a map of a run is made of. */
const mapTypes = { frame: Uint8Array, closing: Int16Array } as const;
type MapKind = keyof typeof mapTypes;

/**
 * Stores the frame of a year. Repeating it is harmless; on a run that still runs a different one takes its place.
 * @throws ProblemError at `year`; `invalid-request` for anything but the right binary; `conflict` when the run is over
 */
export async function putFrame(
  services: Services,
  runId: string,
  year: number,
  body: Readable,
): Promise<void> {
  const run = await requireRun(services.dataSource.manager, runId);
  const years = frameYears(readJson(runSpecSchema, run.spec));
  if (!years.includes(year))
    throw fieldProblem(
      'year',
      `The run has no frame of ${year}; expected one of ${years[0]} to ${years.at(-1)}`,
    );
  await putMap(services, run, 'frame', body, async (manager, { hash, bytes }) => {
    const present = await findFrame(manager, runId, year);
    const write = () => putFrameRow(manager, { runId, year, hash, bytes });
    return { present: present?.hash ?? null, write };
  });
}

/**
 * Stores the closing years; like a frame.
 * @throws ProblemError `invalid-request` for anything but the right binary; `conflict` when the run is over
 */
export async function putClosing(services: Services, runId: string, body: Readable): Promise<void> {
  const run = await requireRun(services.dataSource.manager, runId);
  await putMap(services, run, 'closing', body, async (manager, { hash, bytes }) => {
    const { closingHash } = await requireRun(manager, runId);
    const write = () => updateRun(manager, runId, { closingHash: hash, closingBytes: bytes });
    return { present: closingHash, write };
  });
}

type Manager = Services['dataSource']['manager'];

async function putMap(
  services: Services,
  run: RunRow,
  kind: MapKind,
  body: Readable,
  place: (
    manager: Manager,
    file: ReceivedFile,
  ) => Promise<{ present: string | null; write: () => Promise<void> }>,
): Promise<void> {
  const grid = readJson(gridSchema, run.grid);
  const file = await receiveCells(services, { ...grid, type: mapTypes[kind], what: kind }, body);
  const replaced = await storeWithRows(services, [file], async (manager) => {
    const { present, write } = await place(manager, file);
    if (present === file.hash) return undefined;
    const { status } = await requireRun(manager, run.id);
    if (status !== 'running')
      throw new ProblemError('conflict', `This run is already ${status}; its maps no longer change.`);
    await write();
    return present ?? undefined;
  });
  if (replaced) await releaseBlobs(services, [replaced]);
}
