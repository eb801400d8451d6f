import { randomUUID } from 'node:crypto';
import { gridOf } from '#server/database/site-grid.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import type { UploadRow } from '#server/database/entities/upload.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { closing } from '#server/jobs/background.ts';
import type { TaskProgress } from '#server/jobs/raster-pool.ts';
import { classifyError } from '#server/middleware/classify-error.ts';
import type { Services } from '#server/services.ts';
import { findLayer } from '../layer.repository.ts';
import { installLayer } from '../layer.service.ts';
import { alignToGrid, type AlignedRaster } from '../align-to-grid.ts';
import { findSite } from '../site.repository.ts';
import { verticalOf, type SurveyedUpload } from './plan-upload.ts';
import { planOf, surveyed } from './upload-reply.ts';
import { findUpload, updateUpload } from './upload.repository.ts';

/** How often work is begun that ends with the server each time. */
const mostAttempts = 3;

/** The upload was dismissed, cancelled or changed while it was worked on: what was made of it is thrown away. */
class Overtaken extends Error {
  override name = 'Overtaken';
}

/**
 * Does what the state of an upload asks for: reads it, or makes it a layer, or both where it may be placed by itself.
 * Whatever becomes of it stands in its row.
 */
export async function performUpload(
  services: Services,
  id: string,
  progress: Required<TaskProgress>,
): Promise<void> {
  const row = await findUpload(services.dataSource.manager, id);
  if (row?.state !== 'reading' && row?.state !== 'aligning') return;
  if (row.attempts >= mostAttempts) {
    await settle(services, row, 'failed', {
      code: 'internal',
      detail:
        `Work on this file was begun ${row.attempts} times, and the server ended each time before it was done. ` +
        'Try again when nothing else is running; if it happens again, clip or coarsen the raster.',
    });
    return;
  }
  await services.write((manager) => updateUpload(manager, id, { attempts: row.attempts + 1 }));
  try {
    if (row.state === 'reading') await read(services, row, progress);
    else await place(services, row, progress);
  } catch (error) {
    if (error instanceof Overtaken) return;
    await breakOff(services, row, error, progress.signal);
  }
}

/** Writes down why the work on an upload ended early. */
async function breakOff(
  services: Services,
  row: UploadRow,
  error: unknown,
  signal: AbortSignal,
): Promise<void> {
  if (signal.aborted) {
    // Whoever cancelled it has said so in the row; at the server's end it is to be taken up again.
    if (signal.reason === closing)
      await services.write((manager) => updateUpload(manager, row.id, { attempts: 0 }));
    return;
  }
  const { code, message, extra } = classifyError(error);
  const broken = code === 'internal' || code === 'too-many-requests';
  if (code === 'internal') services.log.error({ err: error, upload: row.id }, 'work on an upload broke off');
  const state = broken ? 'failed' : row.state === 'reading' ? 'refused' : 'choices';
  await settle(services, row, state, {
    code,
    detail: broken
      ? 'The work on this file broke off; the file itself is safe. Try again; if it happens again, tell whoever runs the server.'
      : message,
    ...extra,
  });
}

/** Ends the work on an upload unless somebody has overtaken it. */
const settle = (services: Services, row: UploadRow, state: string, problem: object): Promise<void> =>
  services.write(async (manager) => {
    const now = await findUpload(manager, row.id);
    if (now?.state === row.state)
      await updateUpload(manager, row.id, { state, problem: JSON.stringify(problem) });
  });

async function read(services: Services, row: UploadRow, progress: Required<TaskProgress>): Promise<void> {
  const { blobs, backgroundRasters } = services;
  const { band } = JSON.parse(row.choices) as { band: number | null };
  const thumbnailPath = blobs.reserve();
  try {
    const { thumbnail, ...survey } = await backgroundRasters.run(
      { kind: 'survey', path: blobs.locate(row.hash), band, thumbnailPath },
      progress,
    );
    const state = await storeWithRows(services, [{ path: thumbnailPath, ...thumbnail }], async (manager) => {
      const now = await findUpload(manager, row.id);
      if (now?.state !== 'reading' || now.choices !== row.choices) throw new Overtaken();
      const known = {
        description: JSON.stringify(survey.description),
        facts: JSON.stringify(survey.facts),
        band: survey.band,
        thumbnailHash: thumbnail.hash,
        attempts: 0,
      };
      const plan = await planOf(manager, { ...now, ...known });
      const clear = now.siteId !== null && !plan!.problem && mayPlace(now.place, plan!.decisions);
      await updateUpload(manager, row.id, { ...known, state: clear ? 'aligning' : 'choices' });
      return clear ? 'aligning' : 'choices';
    });
    if (row.thumbnailHash) await releaseBlobs(services, [row.thumbnailHash]);
    // A piece of work of its own, whose progress starts anew.
    if (state === 'aligning')
      services.background.start(row.id, (anew) => performUpload(services, row.id, anew));
  } finally {
    await blobs.discard({ path: thumbnailPath });
  }
}

const needsChoice = ['part', 'band', 'heights', 'year'];

/** Whether an upload becomes a layer by itself. */
function mayPlace(place: string, decisions: readonly string[]): boolean {
  if (place === 'when-asked' || needsChoice.some((need) => decisions.includes(need))) return false;
  return place === 'always' || decisions.length === 0;
}

async function place(services: Services, row: UploadRow, progress: Required<TaskProgress>): Promise<void> {
  const upload = surveyed(row)!;
  const site = await findSite(services.dataSource.manager, row.siteId!);
  if (!site) throw new Overtaken();
  const grid = gridOf(site);
  const { method, part } = upload.choices;
  const aligned = await alignToGrid(
    services,
    { source: row, part: part!, band: upload.band, grid, method, unit: upload.choices.unit },
    progress,
  );
  // The grid is still the same: it changes only by work that waits behind this.
  await storeWithRows(services, aligned.files, async (manager) => {
    const now = await findUpload(manager, row.id);
    if (now?.state !== 'aligning' || now.choices !== row.choices) throw new Overtaken();
    const old = row.putBackOf === null ? null : await findLayer(manager, row.siteId!, row.putBackOf);
    const layer = layerOf(row, upload, aligned, old);
    await installLayer(manager, layer, services.clock().toISOString());
    await updateUpload(manager, row.id, { state: 'done', layerId: layer.id, problem: null, attempts: 0 });
  });
}

/** The row of the layer that an upload becomes; one that is put back keeps what was said about it. */
function layerOf(
  row: UploadRow,
  upload: SurveyedUpload,
  { stored }: AlignedRaster,
  old: LayerRow | null,
): LayerRow {
  const { part, year, note } = upload.choices;
  return {
    id: randomUUID(),
    siteId: row.siteId!,
    part: part!,
    year: part === 'resurvey' ? year! : 0,
    ...stored,
    fileName: row.fileName,
    sourceHash: row.hash,
    sourceBytes: row.bytes,
    note: old?.note ?? note,
    vertical: part === 'elevation' ? (old?.vertical ?? JSON.stringify(verticalOf(upload))) : null,
    classes: old?.classes ?? null,
    uploadedAt: row.uploadedAt,
    uploadedBy: row.uploadedBy,
    replacedAt: null,
  };
}
