import { z } from 'zod';
import { comparisonPlanSchema, decisionSchema } from '#contract/comparisons.ts';
import { gridSchema } from '#contract/grid.ts';
import { comparisonCautionSchema } from '#sim-core/spec/caution.ts';
import { replicateRecordSchema, type ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { readJson } from '#server/database/json-column.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { BriefSource } from '#server/printing/brief-facts.ts';
import type { Services } from '#server/services.ts';
import { layersByHash } from '#server/specs/site-layers.repository.ts';
import {
  closingMaps,
  comparedLayers,
  findComparison,
  findSite,
  recordsOf,
  teamName,
} from './brief.repository.ts';

/** What the figures of a brief are worked out from, as it is stored now, and the hashes of the maps that go with it. */
export interface StoredSource {
  readonly source: BriefSource;
  /** blob of each option's closing map under the first outlook; null where none is stored */
  readonly mapHashes: readonly (string | null)[];
}

/**
 * Reads all that a brief of a comparison is made of.
 * @param team what the team is called in it, where that is not yet its name
 * @throws ProblemError `not-found`; `conflict` while fewer than two futures of every option are stored
 */
export async function readBriefSource(
  services: Services,
  siteId: string,
  comparisonId: string,
  team?: string,
): Promise<StoredSource> {
  const { manager } = services.dataSource;
  const row = await findComparison(manager, siteId, comparisonId);
  const site = await findSite(manager, siteId);
  if (!row || !site) throw notFound();
  const plan = { ...readJson(comparisonPlanSchema, row.plan), replicates: row.replicates };
  const records: ReplicateRecord[][][] = [];
  for (let option = 0; option < plan.options.length; option++) {
    records.push([]);
    for (let outlook = 0; outlook < plan.outlooks.length; outlook++) {
      const stored = await recordsOf(manager, comparisonId, option, outlook);
      records[option].push(stored.map((record) => readJson(replicateRecordSchema, record)));
    }
  }
  const fewest = Math.min(...records.flat().map((stored) => stored.length));
  if (fewest < 2)
    throw new ProblemError(
      'conflict',
      `Found ${fewest} futures of each option in “${row.name}”; a brief rests on at least 2. Let the comparison run on.`,
    );
  const maps = await closingMaps(manager, comparisonId);
  const mapOf = plan.options.map((_, option) => maps.find((map) => map.option === option));
  const layers = await layersByHash(manager, siteId, await comparedLayers(manager, comparisonId));
  return {
    source: {
      madeAt: services.clock().toISOString(),
      teamName: team ?? (await teamName(manager, site.teamId)),
      siteName: site.name,
      invented: site.invented,
      grid: readJson(gridSchema, row.grid),
      crsName: row.crsName,
      comparison: {
        id: row.id,
        name: row.name,
        startedAt: row.startedAt,
        startedBy: row.startedBy,
        ending: row.ending,
      },
      plan,
      decision: row.decision === null ? null : readJson(decisionSchema, row.decision),
      layers: layers.map(({ hash, part, fileName, uploadedAt }) => ({ hash, part, fileName, uploadedAt })),
      records,
      mapFutures: mapOf.map((map) => map?.replicates ?? null),
      warnings: readJson(z.array(comparisonCautionSchema), row.cautions).map(({ message, outlooks }) =>
        outlooks.length === 0 ? message : `${outlooks.join(', ')}: ${message}`,
      ),
    },
    mapHashes: mapOf.map((map) => map?.hash ?? null),
  };
}
