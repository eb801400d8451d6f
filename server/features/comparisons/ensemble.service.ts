import type { Readable } from 'node:stream';
import { comparisonPlanSchema, replicateSpec } from '#contract/comparisons.ts';
import { gridSchema } from '#contract/grid.ts';
import { ratesOfRun } from '#sim-core/belief/rates-of-run.ts';
import { anyRateNames } from '#sim-core/spec/all-parameters.ts';
import { replicateRecordSchema, type ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import type { ComparisonRow } from '#server/database/entities/comparison.ts';
import type { EnsembleAddress } from '#server/database/entities/comparison-parts.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { FileTooLarge, type ReceivedFile } from '#server/files/blob-store.ts';
import { receiveCells } from '#server/files/receive-cells.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { mapsState, requireComparison } from './comparison-reply.ts';
import {
  countReplicates,
  findMap,
  insertReplicates,
  putMapRow,
  replicatesOf,
  storedReplicates,
} from './comparison.repository.ts';
import { requireOpen } from './comparison.service.ts';

export interface EnsembleParams extends EnsembleAddress {
  siteId: string;
}

/** @throws ProblemError `not-found` where the plan has no such ensemble */
export async function requireEnsemble(
  manager: Manager,
  { siteId, comparisonId, option, outlook }: EnsembleParams,
) {
  const row = await requireComparison(manager, siteId, comparisonId);
  const plan = readJson(comparisonPlanSchema, row.plan);
  if (option >= plan.options.length || outlook >= plan.outlooks.length) throw notFound();
  return { row, plan, address: { comparisonId, option, outlook } };
}

/**
 * Stores replicates of an ensemble. Those that are stored already with the same digest are passed over, so a request
 * that got lost on its way may be repeated. Returns how many the ensemble then has.
 *
 * @throws ProblemError at `replicates.N.…`; `digest-mismatch` where a stored one came to another digest; `conflict`
 * when the comparison no longer runs
 */
export function putReplicates(
  services: Services,
  params: EnsembleParams,
  replicates: ReplicateRecord[],
): Promise<{ done: number }> {
  return services.write(async (manager) => {
    const { row, plan, address } = await requireEnsemble(manager, params);
    requireRunning(row);
    const { surveyYear, years } = plan.common;
    const { option, outlook } = address;
    replicates.forEach((found, i) => {
      const at = `replicates.${i}`;
      if (found.replicate >= row.replicates)
        throw fieldProblem(
          `${at}.replicate`,
          `Found ${found.replicate}; expected 0 to ${row.replicates - 1}`,
        );
      if (found.coveredArea.length !== years + 1)
        throw fieldProblem(
          `${at}.coveredArea`,
          `Found ${found.coveredArea.length} values; expected ${years + 1}`,
        );
      if (found.droughtIndex.length !== years)
        throw fieldProblem(
          `${at}.droughtIndex`,
          `Found ${found.droughtIndex.length} values; expected ${years}`,
        );
      const { drawn } = ratesOfRun(replicateSpec(plan, option, outlook, found.replicate));
      for (const name of anyRateNames)
        if (found.drawn[name] !== drawn[name])
          throw fieldProblem(
            `${at}.drawn.${name}`,
            `Found ${found.drawn[name] ?? 'nothing'}; replicate ${found.replicate} draws ${drawn[name] ?? 'none'}. Load the page again, so that all use the same engine`,
          );
      for (const name of ['recoveredYear', 'lostYear', 'droughtYear'] as const) {
        const year = found[name];
        if (year !== null && !(year >= surveyYear && year <= surveyYear + years))
          throw fieldProblem(
            `${at}.${name}`,
            `Found ${year}; expected ${surveyYear} to ${surveyYear + years}`,
          );
      }
    });
    const stored = await storedReplicates(
      manager,
      address,
      replicates.map(({ replicate }) => replicate),
    );
    const digests = new Map(stored.map(({ replicate, digest }) => [replicate, digest]));
    const fresh = new Map<number, ReplicateRecord>();
    for (const found of replicates) {
      const before = digests.get(found.replicate) ?? fresh.get(found.replicate)?.digest;
      if (before === undefined) fresh.set(found.replicate, found);
      else if (before !== found.digest)
        throw new ProblemError(
          'digest-mismatch',
          `Replicate ${found.replicate} came to ${found.digest.slice(0, 12)}…; stored is ${before.slice(0, 12)}…. The same run must come to the same digest: load the page again, so that all tabs use the same engine.`,
        );
    }
    await insertReplicates(
      manager,
      [...fresh.values()].map((found) => ({
        ...address,
        replicate: found.replicate,
        digest: found.digest,
        record: JSON.stringify(found),
      })),
    );
    const counts = await countReplicates(manager, [address.comparisonId]);
    const here = counts.find(
      ({ option, outlook }) => option === address.option && outlook === address.outlook,
    );
    return { done: here?.done ?? 0 };
  });
}

/** The stored replicates of an ensemble, ascending. @throws ProblemError `not-found` */
export async function getReplicates(
  manager: Manager,
  params: EnsembleParams,
  page: { offset: number; limit: number },
): Promise<{ replicates: ReplicateRecord[]; total: number }> {
  const { address } = await requireEnsemble(manager, params);
  const [rows, total] = await replicatesOf(manager, address, page);
  return { replicates: rows.map((row) => readJson(replicateRecordSchema, row.record)), total };
}

/**
 * Stores a map of an ensemble in the place of an older one.
 * @throws ProblemError `invalid-request` for anything but the right binary; `conflict` when nothing changes any more
 */
export async function putEnsembleMap(
  services: Services,
  params: EnsembleParams & { map: string },
  replicates: number,
  body: Readable,
): Promise<void> {
  const { row } = await requireEnsemble(services.dataSource.manager, params);
  const { width, height } = readJson(gridSchema, row.grid);
  const type = params.map === 'closing' ? Int16Array : Uint8Array;
  const file = await receiveCells(services, { width, height, type, what: 'map' }, body);
  await putFile(services, params, params.map, replicates, file);
}

/** Most bytes of the counts behind the maps: two counts of 16 bits a cell for each of 60 years, before they are packed. */
const longestState = (cells: number) => 2 * 2 * 60 * cells + 65_536;

/** Stores what the browser needs to go on with the maps of an ensemble. @throws ProblemError `too-large`, `conflict` */
export async function putMapsState(
  services: Services,
  params: EnsembleParams,
  replicates: number,
  body: Readable,
): Promise<void> {
  const { row } = await requireEnsemble(services.dataSource.manager, params);
  const { width, height } = readJson(gridSchema, row.grid);
  const limit = longestState(width * height);
  try {
    const file = await services.blobs.receive(body, limit);
    await putFile(services, params, mapsState, replicates, file);
  } catch (error) {
    if (error instanceof FileTooLarge)
      throw new ProblemError(
        'too-large',
        `Found more than ${limit} bytes; the counts behind maps are shorter.`,
      );
    throw error;
  }
}

async function putFile(
  services: Services,
  params: EnsembleParams,
  map: string,
  replicates: number,
  file: ReceivedFile,
): Promise<void> {
  const replaced = await storeWithRows(services, [file], async (manager) => {
    const { row, address } = await requireEnsemble(manager, params);
    requireOpen(row);
    const before = await findMap(manager, address, map);
    await putMapRow(manager, { ...address, map, hash: file.hash, bytes: file.bytes, replicates });
    return before && before.hash !== file.hash ? before.hash : undefined;
  });
  if (replaced) await releaseBlobs(services, [replaced]);
}

/** The stored file of a map, or of the counts behind them. @throws ProblemError `not-found` */
export async function findStoredMap(manager: Manager, params: EnsembleParams, map: string) {
  const { row, address } = await requireEnsemble(manager, params);
  const found = await findMap(manager, address, map);
  if (!found) throw notFound();
  return { hash: found.hash, frozen: row.decision !== null };
}

function requireRunning(row: ComparisonRow): void {
  requireOpen(row);
  if (row.status !== 'running')
    throw new ProblemError(
      'conflict',
      `This comparison is ${row.status}. Resume it, then send its replicates.`,
    );
}
