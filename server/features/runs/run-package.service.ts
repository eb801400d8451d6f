import { safeFileName } from '#server/files/file-name.ts';
import { ZipTooLarge, zipStream } from '#server/files/zip-stream.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { BytesReply } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { packageParts, specText } from './package/package-parts.ts';
import { runReply } from './run-reply.ts';
import { findSite } from './run.repository.ts';

/** The spec as the command line takes it. @throws ProblemError `not-found` */
export async function exportSpec(services: Services, runId: string): Promise<BytesReply> {
  const { run, site } = await runOfSite(services, runId);
  return {
    bytes: Buffer.from(specText(run), 'utf8'),
    type: 'application/json; charset=utf-8',
    fileName: safeFileName([site.name, run.name, 'spec'], 'json'),
  };
}

/**
 * The spec with its rasters as a ZIP archive, sent while it is made.
 * @throws ProblemError `not-found`; `too-large` for rasters beyond what one archive holds
 */
export async function exportPackage(services: Services, runId: string): Promise<BytesReply> {
  const { run, site } = await runOfSite(services, runId);
  const about = { siteName: site.name, invented: site.invented };
  const parts = await packageParts(services.blobs, run, about);
  try {
    return {
      bytes: zipStream(parts, new Date(run.startedAt)),
      type: 'application/zip',
      fileName: safeFileName([site.name, run.name, 'files'], 'zip'),
    };
  } catch (error) {
    if (!(error instanceof ZipTooLarge)) throw error;
    throw new ProblemError(
      'too-large',
      `The rasters of this run do not fit into one archive: ${error.message}. Take the spec by itself, and each raster on Ground.`,
    );
  }
}

async function runOfSite(services: Services, runId: string) {
  const { manager } = services.dataSource;
  const run = await runReply(manager, runId);
  const site = await findSite(manager, run.siteId);
  if (!site) throw notFound();
  return { run, site };
}
