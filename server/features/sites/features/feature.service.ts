import { randomUUID } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import {
  mostCorners,
  mostFeatures,
  type FeatureAttributes,
  type FeatureImportForm,
  type FeatureImportReply,
} from '#contract/features.ts';
import { featureCautions } from '#contract/grid-cautions.ts';
import type { Site } from '#contract/sites.ts';
import type { FeatureImportRow } from '#server/database/entities/feature-import.ts';
import type { FeatureRow } from '#server/database/entities/feature.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import type { ReceivedFile } from '#server/files/blob-store.ts';
import { shownFileName } from '#server/files/file-name.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { ringsOf } from '#sim-core/process/area-cells.ts';
import { areaSchema, type Area } from '#sim-core/spec/run-spec.ts';
import { edgesOf } from './feature-reply.ts';
import { siteReply } from '../site-reply.ts';
import {
  deleteFeatureRow,
  deleteImportRow,
  featureRows,
  findFeature,
  findImport,
  insertImport,
  updateFeature,
} from './feature.repository.ts';
import { findFeatures, type FoundFeatures } from './found-features.ts';

/** What cells on the edge of new features get. */
const importEdges = 'shared';

/** What is listed of a file; the rest is only counted. */
const listed = { features: 500, problems: 200 };

/**
 * Reads points and areas of a file and, unless this is a preview, puts them on the site.
 * @throws ProblemError at `file` for one that cannot be read; at `rows.N` where all were to be taken and some cannot be;
 * when the site would hold too many
 */
export async function importFeatures(
  services: Services,
  siteId: string,
  { take, ...defaults }: FeatureImportForm,
  { file, fileName, by }: { file: ReceivedFile; fileName: string; by: string },
): Promise<FeatureImportReply> {
  const { grid } = await siteReply(services.dataSource.manager, siteId);
  const found = readFound(await readFile(file.path, 'utf8'), grid, defaults);
  const replyOf = (importId: string | null) => replyFor(found, grid, importId);
  if (take === 'preview') return replyOf(null);
  if (take === 'all' && found.problems.length > 0) throw refusal(found);
  if (found.features.length === 0)
    throw fieldProblem('file', 'Found no point or area that can be taken; expected at least one');
  const row: FeatureImportRow = {
    id: randomUUID(),
    siteId,
    fileName: shownFileName(fileName),
    hash: file.hash,
    crsName: found.crsName,
    edges: importEdges,
    importedAt: services.clock().toISOString(),
    importedBy: by,
  };
  await storeWithRows(services, [file], async (manager) => {
    await requireRoom(manager, siteId, found);
    await insertImport(
      manager,
      row,
      found.features.map(({ shape, ...feature }) => ({
        id: randomUUID(),
        siteId,
        importId: row.id,
        shape: JSON.stringify(shape),
        ...feature,
      })),
    );
  });
  return replyOf(row.id);
}

/** The shared readers name the text that they are given `content`; here it came as a file. */
function readFound(content: string, grid: Grid, defaults: Parameters<typeof findFeatures>[2]): FoundFeatures {
  try {
    return findFeatures(content, grid, defaults);
  } catch (error) {
    if (!(error instanceof ProblemError) || error.extra.fields?.[0]?.field !== 'content') throw error;
    throw fieldProblem('file', error.extra.fields[0].message);
  }
}

const replyFor = (
  { read, crsName, features, problems }: FoundFeatures,
  grid: Grid,
  importId: string | null,
): FeatureImportReply => ({
  read,
  crsName,
  features: features.slice(0, listed.features),
  good: features.length,
  problems: problems.slice(0, listed.problems),
  bad: problems.length,
  cautions: featureCautions(
    features.map(({ kind, shape }) => ({ kind, shape, edges: edgesOf(kind, importEdges) })),
    grid,
  ),
  importId,
});

function refusal({ problems }: FoundFeatures): ProblemError {
  const fields = problems
    .slice(0, listed.problems)
    .map(({ row, message }) => ({ field: `rows.${row}`, message }));
  const [first] = problems;
  return new ProblemError(
    'invalid-request',
    `${problems.length} ${problems.length === 1 ? 'row cannot' : 'rows cannot'} be taken, the first in row ${first.row}: ${first.message} ` +
      'Mend the file, or take the good ones alone.',
    { fields },
  );
}

const corners = (shape: Area) =>
  shape.shape === 'polygon' ? ringsOf(shape).reduce((sum, ring) => sum + ring.length, 0) : 1;

async function requireRoom(manager: Manager, siteId: string, { features }: FoundFeatures): Promise<void> {
  const present = await featureRows(manager, siteId);
  const shapes = [
    ...present.map(({ shape }) => readJson(areaSchema, shape)),
    ...features.map((f) => f.shape),
  ];
  const all = shapes.reduce((sum, shape) => sum + corners(shape), 0);
  if (shapes.length > mostFeatures || all > mostCorners)
    throw fieldProblem(
      'file',
      `With it the site would hold ${shapes.length} features with ${all} corners; expected at most ${mostFeatures} with ` +
        `${mostCorners}. Simplify the outlines, or delete an earlier import`,
    );
}

/** Changes what is said of a feature. @throws ProblemError `not-found`; at `radius` or `halo` where it has none */
export function changeFeature(
  services: Services,
  siteId: string,
  featureId: string,
  { radius, ...change }: Partial<FeatureAttributes>,
): Promise<Site> {
  return services.write(async (manager) => {
    const row = await requireFeature(manager, siteId, featureId);
    const shape = readJson(areaSchema, row.shape);
    const disc = shape.shape === 'disc';
    if (radius !== undefined && disc !== (radius !== null))
      throw fieldProblem('radius', disc ? 'A point needs a radius' : 'An area has no radius');
    if (change.halo && (row.kind !== 'refuge' || !disc))
      throw fieldProblem('halo', 'Only a refuge around a point fades out beyond its radius');
    const next: Partial<FeatureRow> = { ...change };
    if (disc && typeof radius === 'number') next.shape = JSON.stringify({ ...shape, radius });
    if (Object.keys(next).length > 0) await updateFeature(manager, featureId, next);
    return siteReply(manager, siteId);
  });
}

async function requireFeature(manager: Manager, siteId: string, id: string): Promise<FeatureRow> {
  const row = await findFeature(manager, siteId, id);
  if (!row) throw notFound();
  return row;
}

/** Deletes a feature; runs keep what they were started with. @throws ProblemError `not-found` */
export function deleteFeature(services: Services, siteId: string, featureId: string): Promise<Site> {
  return services.write(async (manager) => {
    await requireFeature(manager, siteId, featureId);
    await deleteFeatureRow(manager, featureId);
    return siteReply(manager, siteId);
  });
}

/** Deletes all features that came with one file, and the file. @throws ProblemError `not-found` */
export async function deleteFeatureImport(
  services: Services,
  siteId: string,
  importId: string,
): Promise<Site> {
  const { site, hash } = await services.write(async (manager) => {
    const row = await findImport(manager, siteId, importId);
    if (!row) throw notFound();
    await deleteImportRow(manager, importId);
    return { site: await siteReply(manager, siteId), hash: row.hash };
  });
  await releaseBlobs(services, [hash]);
  return site;
}
