import { randomUUID } from 'node:crypto';
import type { LayerPart } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import type { Upload, UploadChoices } from '#contract/uploads.ts';
import type { UploadRow } from '#server/database/entities/upload.ts';
import type { Manager } from '#server/database/manager.ts';
import type { ReceivedFile } from '#server/files/blob-store.ts';
import { shownFileName } from '#server/files/file-name.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { newSiteRows } from '../new-site.ts';
import { siteReply } from '../site-reply.ts';
import { findSite, insertSite } from '../site.repository.ts';
import { performUpload } from './perform-upload.ts';
import { fitsPart } from './plan-upload.ts';
import { planOf, surveyed, uploadReply } from './upload-reply.ts';
import {
  countUploads,
  deleteUploadRow,
  findTeamUpload,
  insertUpload,
  unfinishedUploads,
  updateUpload,
  uploadsOf,
} from './upload.repository.ts';

/** Uploads of a team that may lie about at once. */
const mostUploads = 100;

export const noChoices: UploadChoices = {
  part: null,
  band: null,
  method: null,
  unit: null,
  vertical: null,
  year: null,
  grid: null,
  note: '',
};

/** Has the work on an upload done behind the requests. */
export function startUpload(services: Services, id: string): void {
  services.background.start(id, (progress) => performUpload(services, id, progress));
}

/** Takes up again what an earlier process left unfinished. */
export async function resumeUploads(services: Services): Promise<void> {
  for (const { id } of await unfinishedUploads(services.dataSource.manager)) startUpload(services, id);
}

/** A row of a raster whose reading is yet to begin. */
export const uploadRowOf = (
  known: Pick<
    UploadRow,
    'teamId' | 'siteId' | 'fileName' | 'hash' | 'bytes' | 'uploadedAt' | 'uploadedBy' | 'place'
  >,
  choices: UploadChoices,
  putBackOf: string | null = null,
): UploadRow => ({
  id: randomUUID(),
  ...known,
  state: 'reading',
  attempts: 0,
  putBackOf,
  description: null,
  facts: null,
  band: null,
  thumbnailHash: null,
  choices: JSON.stringify(choices),
  problem: null,
  layerId: null,
});

/**
 * Takes a file in; it is read in the background.
 * @throws ProblemError at `siteId` for a site that the team does not have; when too many uploads lie about
 */
export async function createUpload(
  services: Services,
  teamId: string,
  {
    siteId = null,
    part = null,
    place,
    file,
    fileName,
    by,
  }: {
    siteId?: string | null;
    part?: LayerPart | null;
    place: 'when-clear' | 'when-asked';
    file: ReceivedFile;
    fileName: string;
    by: string;
  },
): Promise<Upload> {
  const { manager } = services.dataSource;
  await requireOwnSite(manager, teamId, siteId);
  const { hash, bytes } = file;
  const row = uploadRowOf(
    {
      teamId,
      siteId,
      fileName: shownFileName(fileName),
      hash,
      bytes,
      uploadedAt: services.clock().toISOString(),
      uploadedBy: by,
      place,
    },
    { ...noChoices, part },
  );
  await storeWithRows(services, [file], async (writer) => {
    if ((await countUploads(writer, teamId)) >= mostUploads)
      throw new ProblemError(
        'conflict',
        `Found ${mostUploads} uploads on the list; no more are taken. Place or dismiss some of them first.`,
      );
    await insertUpload(writer, row);
  });
  startUpload(services, row.id);
  return uploadReply(services, manager, row);
}

/** The uploads of a team for a site, or those that have no site yet. @throws ProblemError `not-found` */
export async function listUploads(
  services: Services,
  teamId: string,
  siteId: string | undefined,
): Promise<Upload[]> {
  const { manager } = services.dataSource;
  await requireOwnSite(manager, teamId, siteId ?? null);
  const rows = await uploadsOf(manager, teamId, siteId ?? null);
  return Promise.all(rows.map((row) => uploadReply(services, manager, row)));
}

async function requireOwnSite(manager: Manager, teamId: string, siteId: string | null): Promise<void> {
  if (siteId === null) return;
  const site = await findSite(manager, siteId);
  if (site?.teamId !== teamId) throw notFound();
}

/** @throws ProblemError `not-found` */
export async function requireUpload(manager: Manager, teamId: string, id: string): Promise<UploadRow> {
  const row = await findTeamUpload(manager, teamId, id);
  if (!row) throw notFound();
  return row;
}

/** Changes a row in one turn of the queue and answers with what it came to. */
async function changeUpload(
  services: Services,
  teamId: string,
  id: string,
  decide: (row: UploadRow, manager: Manager) => Promise<Partial<UploadRow>> | Partial<UploadRow>,
): Promise<Upload> {
  const row = await services.write(async (manager) => {
    const before = await requireUpload(manager, teamId, id);
    const change = await decide(before, manager);
    await updateUpload(manager, id, change);
    return { ...before, ...change };
  });
  if (row.state === 'reading' || row.state === 'aligning') startUpload(services, id);
  return uploadReply(services, services.dataSource.manager, row);
}

const open: readonly string[] = ['choices', 'failed', 'cancelled'];

function requireOpen(row: UploadRow, done: string): void {
  if (!open.includes(row.state) || surveyed(row) === null)
    throw new ProblemError(
      'conflict',
      `This upload is ${row.state}; it can be ${done} once it has been read and until it is placed.`,
    );
}

/**
 * Says what part the raster plays and how it is brought onto the grid. Another band is read anew.
 * @throws ProblemError at `band` or `method` for one that there is not; `conflict` while it is worked on
 */
export function setUploadChoices(
  services: Services,
  teamId: string,
  id: string,
  choices: UploadChoices,
): Promise<Upload> {
  return changeUpload(services, teamId, id, (row) => {
    requireOpen(row, 'decided about');
    const { description, band: read } = surveyed(row)!;
    const { band, part, method, grid } = choices;
    const bands = description.bands.flatMap(({ role, index }) => (role === 'data' ? [index] : []));
    if (band !== null && !bands.includes(band))
      throw fieldProblem('band', `Found band ${band}; this file has values in band ${bands.join(', ')}`);
    if (method !== null && part !== null && !fitsPart(method, part))
      throw fieldProblem('method', `${method} does not suit the values of ${part}`);
    if (grid !== null && row.siteId !== null)
      throw fieldProblem('grid', 'The site has its grid already; a raster cannot bring another');
    const change = { choices: JSON.stringify(choices), problem: null, state: 'choices', attempts: 0 };
    return band === null || band === read ? change : { ...change, state: 'reading', facts: null };
  });
}

/**
 * Agrees to the plan of an upload; it becomes a layer in the background.
 * @throws ProblemError at what must be decided first; `conflict` while it is worked on or has no site
 */
export function placeUpload(services: Services, teamId: string, id: string): Promise<Upload> {
  return changeUpload(services, teamId, id, async (row, manager) => {
    requireOpen(row, 'placed');
    if (row.siteId === null)
      throw new ProblemError('conflict', 'This raster has no site yet: make one from it.');
    await requireClear(manager, row);
    return aligning;
  });
}

const aligning = { state: 'aligning', problem: null, attempts: 0 };

async function requireClear(manager: Manager, row: UploadRow) {
  const plan = (await planOf(manager, row))!;
  const { decisions, problem } = plan;
  if (decisions.includes('part')) throw fieldProblem('part', 'Say which part the raster plays');
  if (decisions.includes('year')) throw fieldProblem('year', 'Say in which year the resurvey was made');
  if (decisions.includes('band')) throw fieldProblem('band', 'Say which band holds the layer');
  if (decisions.includes('heights'))
    throw fieldProblem('vertical', `Say what the heights are in: ${plan.heights!.because}`);
  if (problem) {
    const { code, detail, ...parts } = problem;
    throw new ProblemError(code, detail, parts);
  }
  return plan;
}

/**
 * Makes a site on the grid that the raster leads to; it becomes the first layer in the background.
 * @throws ProblemError as `placeUpload`; `conflict` when it has a site
 */
export async function makeSiteFromUpload(
  services: Services,
  teamId: string,
  id: string,
  { name, by }: { name: string; by: string },
): Promise<Site> {
  const site = await services.write(async (manager) => {
    const row = await requireUpload(manager, teamId, id);
    requireOpen(row, 'made a site of');
    if (row.siteId !== null)
      throw new ProblemError('conflict', 'This raster has its site already: place it there.');
    const { plan } = await requireClear(manager, row);
    const rows = newSiteRows({
      teamId,
      name,
      by,
      grid: plan!.target,
      crsName: plan!.reprojection?.to.name ?? surveyed(row)!.description.crs.name,
      now: services.clock(),
    });
    await insertSite(manager, rows);
    await updateUpload(manager, id, { siteId: rows.site.id, ...aligning });
    return siteReply(manager, rows.site.id);
  });
  startUpload(services, id);
  return site;
}

/** Stops the work on an upload; the file and what was chosen stay. @throws ProblemError `conflict` when there is none */
export async function cancelUpload(services: Services, teamId: string, id: string): Promise<Upload> {
  const reply = await changeUpload(services, teamId, id, (row) => {
    if (row.state !== 'reading' && row.state !== 'aligning')
      throw new ProblemError('conflict', `This upload is ${row.state}; there is nothing to stop.`);
    return { state: 'cancelled' };
  });
  await services.background.cancel(id);
  return reply;
}

/** Takes up again what was cancelled or failed. @throws ProblemError `conflict` otherwise */
export function retryUpload(services: Services, teamId: string, id: string): Promise<Upload> {
  return changeUpload(services, teamId, id, async (row, manager) => {
    if (row.state !== 'failed' && row.state !== 'cancelled')
      throw new ProblemError('conflict', `This upload is ${row.state}; there is nothing to try again.`);
    if (row.facts === null) return { ...aligning, state: 'reading' };
    if (row.siteId === null) return { ...aligning, state: 'choices' };
    await requireClear(manager, row);
    return aligning;
  });
}

/** Takes an upload off the list and stops what is under way; a layer that it became stays. */
export async function dismissUpload(services: Services, teamId: string, id: string): Promise<void> {
  const row = await services.write(async (manager) => {
    const found = await requireUpload(manager, teamId, id);
    await deleteUploadRow(manager, id);
    return found;
  });
  await services.background.cancel(id);
  await releaseBlobs(services, [row.hash, ...(row.thumbnailHash ? [row.thumbnailHash] : [])]);
}
