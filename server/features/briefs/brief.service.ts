import { randomUUID } from 'node:crypto';
import { briefFactsSchema, type BriefFacts, type BriefText } from '#contract/brief-content.ts';
import type { Brief } from '#contract/briefs.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import type { ReceivedFile } from '#server/files/blob-store.ts';
import { safeFileName } from '#server/files/file-name.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { BytesReply } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { briefReply, reached, requireBrief, requireVersion } from './brief-reply.ts';
import { readBriefSource } from './brief-source.ts';
import { followFigures } from './follow-figures.ts';
import { deleteBriefRows, insertBrief, insertVersion, mapsOf, messagesOf } from './brief.repository.ts';

export interface BriefAddress {
  siteId: string;
  briefId: string;
}

/** The figures of a version with its maps: fresh ones are arrivals, kept ones stand in the store already. */
interface Figures {
  readonly facts: BriefFacts;
  readonly maps: readonly { option: number; hash: string; path: string }[];
  readonly arrivals: readonly ReceivedFile[];
}

/**
 * Makes a brief of a comparison, in the words that its figures suggest.
 * @param team what the team is called in it, where that is not yet its name
 * @throws ProblemError `not-found`; `conflict` while there are too few futures
 */
export async function makeBrief(
  services: Services,
  siteId: string,
  comparisonId: string,
  by: string,
  team?: string,
): Promise<Brief> {
  const figures = await freshFigures(services, siteId, comparisonId, team);
  const id = randomUUID();
  return storeVersion(services, { siteId, briefId: id }, figures, {
    version: 1,
    text: figures.facts.suggested,
    by,
    begin: (manager, at) => insertBrief(manager, { id, siteId, comparisonId, version: 1, createdAt: at }),
  });
}

/**
 * Saves a new version. With figures anew, words that nobody changed are those that the new figures suggest.
 * @throws ProblemError `conflict` where another version came meanwhile, or the comparison is gone
 */
export async function saveBrief(
  services: Services,
  { siteId, briefId }: BriefAddress,
  { base, text, figures: which }: { base: number; text: BriefText; figures: 'kept' | 'anew' },
  by: string,
): Promise<Brief> {
  const { manager } = services.dataSource;
  const brief = await requireBrief(manager, siteId, briefId);
  requireNewest(brief.version, base);
  const before = await requireVersion(manager, briefId, base);
  const facts = readJson(briefFactsSchema, before.facts);
  if (which === 'anew' && brief.comparisonId === null)
    throw new ProblemError(
      'conflict',
      'The comparison of this brief was deleted, so its figures stay as they are.',
    );
  const figures =
    which === 'anew'
      ? await freshFigures(services, siteId, brief.comparisonId!)
      : await keptFigures(services, briefId, base, facts);
  return storeVersion(services, { siteId, briefId }, figures, {
    version: base + 1,
    text: which === 'anew' ? followFigures(text, facts.suggested, figures.facts.suggested) : text,
    by,
    begin: async (writer) => {
      requireNewest((await requireBrief(writer, siteId, briefId)).version, base);
    },
  });
}

function requireNewest(newest: number, base: number): void {
  if (newest !== base)
    throw new ProblemError(
      'conflict',
      `Found version ${newest}; this was written on version ${base}. Look at what changed, then save on the newest.`,
    );
}

/** A brief of its own with the words and the figures of another's newest version. */
export async function copyBrief(
  services: Services,
  { siteId, briefId }: BriefAddress,
  by: string,
): Promise<Brief> {
  const { version, text, facts, comparisonId } = await briefReply(
    services.dataSource.manager,
    siteId,
    briefId,
  );
  const id = randomUUID();
  const figures = await keptFigures(services, briefId, version, facts);
  return storeVersion(services, { siteId, briefId: id }, figures, {
    version: 1,
    text: { ...text, title: `${text.title.slice(0, 152)}, copy` },
    by,
    begin: (writer, at) => insertBrief(writer, { id, siteId, comparisonId, version: 1, createdAt: at }),
  });
}

/** @throws ProblemError `conflict` once it was sent: what people have been given is kept */
export async function deleteBrief(services: Services, { siteId, briefId }: BriefAddress): Promise<void> {
  const hashes = await services.write(async (manager) => {
    await requireBrief(manager, siteId, briefId);
    if (reached(await messagesOf(manager, briefId)) > 0)
      throw new ProblemError(
        'conflict',
        'This brief was sent, so it is kept with what was sent. Copy it to go on from it.',
      );
    return deleteBriefRows(manager, briefId);
  });
  await releaseBlobs(services, hashes);
}

export const pdfType = 'application/pdf';

/** Where the PDF of a version stands, and what it is called. @throws ProblemError `not-found` */
export async function findPdf(
  { dataSource: { manager } }: Services,
  { siteId, briefId }: BriefAddress,
  version: number,
): Promise<{ hash: string; fileName: string }> {
  await requireBrief(manager, siteId, briefId);
  const { facts, pdfHash } = await requireVersion(manager, briefId, version);
  const { siteName } = readJson(briefFactsSchema, facts);
  return { hash: pdfHash, fileName: safeFileName([siteName, 'brief', `version ${version}`], 'pdf') };
}

/** The PDF of a version. @throws ProblemError `not-found` */
export async function briefPdf(
  services: Services,
  { siteId, briefId }: BriefAddress,
  version: number,
): Promise<BytesReply> {
  const { hash, fileName } = await findPdf(services, { siteId, briefId }, version);
  const { stream, bytes } = await services.blobs.open(hash);
  return {
    bytes: stream,
    length: bytes,
    type: pdfType,
    fileName,
    etag: hash,
    immutable: true,
  };
}

/** The map of an option as a version prints it. @throws ProblemError `not-found` */
export async function briefMap(
  services: Services,
  { siteId, briefId }: BriefAddress,
  version: number,
  option: number,
): Promise<BytesReply> {
  const { manager } = services.dataSource;
  await requireBrief(manager, siteId, briefId);
  const map = (await mapsOf(manager, briefId, version)).find((each) => each.option === option);
  if (!map) throw notFound();
  const { stream, bytes } = await services.blobs.open(map.hash);
  return { bytes: stream, length: bytes, type: 'image/png', etag: map.hash, immutable: true };
}

async function freshFigures(
  services: Services,
  siteId: string,
  comparisonId: string,
  team?: string,
): Promise<Figures> {
  const { source, mapHashes } = await readBriefSource(services, siteId, comparisonId, team);
  const { blobs, rasters } = services;
  const wanted = mapHashes.map((hash) => hash && { path: blobs.locate(hash), outPath: blobs.reserve() });
  try {
    const { facts, maps } = await rasters.run({
      kind: 'brief-facts',
      source,
      maps: wanted.map((map) => map || null),
    });
    const drawn = maps.flatMap((map, option) =>
      map ? [{ option, ...map, path: (wanted[option] || { outPath: '' }).outPath }] : [],
    );
    return { facts, maps: drawn, arrivals: drawn };
  } catch (error) {
    for (const map of wanted) if (map) await blobs.discard({ path: map.outPath });
    throw error;
  }
}

async function keptFigures(
  services: Services,
  briefId: string,
  version: number,
  facts: BriefFacts,
): Promise<Figures> {
  const maps = await mapsOf(services.dataSource.manager, briefId, version);
  return {
    facts,
    maps: maps.map(({ option, hash }) => ({ option, hash, path: services.blobs.locate(hash) })),
    arrivals: [],
  };
}

interface NewVersion {
  readonly version: number;
  readonly text: BriefText;
  readonly by: string;
  /** what comes first in the same turn of the write queue, at the instant of the version */
  begin: (manager: Manager, at: string) => Promise<void>;
}

/** Prints a version and stores it with its PDF and maps, all or nothing. */
async function storeVersion(
  services: Services,
  { siteId, briefId }: BriefAddress,
  { facts, maps, arrivals }: Figures,
  { version, text, by, begin }: NewVersion,
): Promise<Brief> {
  const { blobs, rasters } = services;
  const outPath = blobs.reserve();
  try {
    const paths = facts.options.map((_, option) => maps.find((map) => map.option === option)?.path);
    const pdf = await rasters.run({
      kind: 'write-brief',
      brief: { text, facts, version, maps: paths },
      outPath,
    });
    const { hash, bytes, pages, briefPages } = pdf;
    const at = services.clock().toISOString();
    return await storeWithRows(services, [...arrivals, { path: outPath, hash, bytes }], async (manager) => {
      await begin(manager, at);
      await insertVersion(
        manager,
        {
          briefId,
          version,
          text: JSON.stringify(text),
          facts: JSON.stringify(facts),
          pdfHash: hash,
          bytes,
          pages,
          briefPages,
          at,
          by,
        },
        maps,
      );
      return briefReply(manager, siteId, briefId);
    });
  } catch (error) {
    for (const file of [...arrivals, { path: outPath }]) await blobs.discard(file);
    throw error;
  }
}
