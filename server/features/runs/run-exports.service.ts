import { createReadStream } from 'node:fs';
import { runResultSchema } from '#sim-core/spec/run-result.ts';
import { gridSchema } from '#contract/grid.ts';
import type { RunRow } from '#server/database/entities/run.ts';
import { readJson } from '#server/database/json-column.ts';
import { safeFileName } from '#server/files/file-name.ts';
import { seriesCsv } from '#server/files/series-csv.ts';
import type { WriteMapTask } from '#server/jobs/raster-tasks.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { BytesReply } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { requireRun } from './run-reply.ts';
import { findFrame, findSite } from './run.repository.ts';

/** The series as a CSV download. @throws ProblemError `conflict` while the run is not finished */
export async function exportSeries(services: Services, runId: string): Promise<BytesReply> {
  const { run, site } = await runWithSite(services, runId);
  if (run.result === null)
    throw new ProblemError('conflict', `The run is ${run.status}; its series is known once it is finished.`);
  return {
    bytes: Buffer.from(seriesCsv(readJson(runResultSchema, run.result).series), 'utf8'),
    type: 'text/csv; charset=utf-8; header=present',
    fileName: safeFileName([site.name, run.name, 'series'], 'csv'),
  };
}

/**
 * The cover of a year as GeoTIFF: Float32 shares 0..1, no data where the plant cannot grow (known once the closing years
 * are stored).
 * @throws ProblemError `not-found` for a year without a frame
 */
export async function exportFrame(services: Services, runId: string, year: number): Promise<BytesReply> {
  const { run, site } = await runWithSite(services, runId);
  const frame = await findFrame(services.dataSource.manager, runId, year);
  if (!frame) throw notFound();
  return exportMap(services, run, {
    map: 'cover',
    path: services.blobs.locate(frame.hash),
    closingPath: run.closingHash === null ? null : services.blobs.locate(run.closingHash),
    title: `Cover at the end of ${year}: ${site.name}, ${run.name}`,
    note: noteOf(site.invented),
    fileName: safeFileName([site.name, run.name, 'cover', year], 'tif'),
  });
}

/** The closing years as GeoTIFF: Int16, 0 = open at the horizon. @throws ProblemError `not-found` without them */
export async function exportClosing(services: Services, runId: string): Promise<BytesReply> {
  const { run, site } = await runWithSite(services, runId);
  if (run.closingHash === null) throw notFound();
  return exportMap(services, run, {
    map: 'closing',
    path: services.blobs.locate(run.closingHash),
    closingPath: null,
    title: `Year in which each cell closes: ${site.name}, ${run.name}`,
    note: noteOf(site.invented),
    fileName: safeFileName([site.name, run.name, 'closing'], 'tif'),
  });
}

const noteOf = (invented: boolean) => `Simulated; no survey${invented ? '. Invented demo data' : ''}`;

async function runWithSite(services: Services, runId: string) {
  const { manager } = services.dataSource;
  const run = await requireRun(manager, runId);
  const site = await findSite(manager, run.siteId);
  if (!site) throw notFound();
  return { run, site };
}

/** Has the worker write the file among the arrivals and sends it from there; it is gone when it has been sent. */
async function exportMap(
  { rasters, blobs }: Services,
  run: RunRow,
  { fileName, ...task }: Omit<WriteMapTask, 'kind' | 'grid' | 'outPath'> & { fileName: string },
): Promise<BytesReply> {
  const outPath = blobs.reserve();
  try {
    const { bytes } = await rasters.run({
      kind: 'write-map',
      ...task,
      grid: readJson(gridSchema, run.grid),
      outPath,
    });
    const stream = createReadStream(outPath);
    stream.once('close', () => void blobs.discard({ path: outPath }));
    return { bytes: stream, length: bytes, type: 'image/tiff', fileName };
  } catch (error) {
    await blobs.discard({ path: outPath });
    throw error;
  }
}
