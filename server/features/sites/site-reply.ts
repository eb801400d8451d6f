import { z } from 'zod';
import {
  habitatClassesSchema,
  layerPartSchema,
  outlookSchema,
  plantSchema,
  valueUnitSchema,
  type Layer,
  type Site,
  type SiteSummary,
} from '#contract/sites.ts';
import type { LayerRow } from '#server/database/entities/layer.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { layerFactsSchema } from '#server/jobs/layer-facts.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { currentLayers } from './layer.repository.ts';
import { countsOfSites, findSite, sitesOfTeam, type SiteCounts } from './site.repository.ts';

const partsSchema = z.array(layerPartSchema);

function summaryOf(site: SiteRow, counts: SiteCounts): SiteSummary {
  const { id, teamId, name, invented, createdAt, ...row } = site;
  const { width, height, cellSize, originX, originY, epsg } = row;
  return {
    id,
    teamId,
    name,
    invented,
    createdAt,
    grid: { width, height, cellSize, originX, originY, epsg },
    parts: partsSchema.parse(counts.parts),
    options: counts.options,
    runs: counts.runs,
  };
}

function layerOf(row: LayerRow): Layer {
  const { id, fileName, hash, bytes, uploadedAt, uploadedBy } = row;
  return {
    id,
    part: layerPartSchema.parse(row.part),
    fileName,
    hash,
    bytes,
    uploadedAt,
    uploadedBy,
    ...readJson(layerFactsSchema, row.facts),
    unit: valueUnitSchema.parse(row.unit),
    classes: row.classes === null ? null : readJson(habitatClassesSchema, row.classes),
  };
}

/** The sites of a team, oldest first. */
export async function listSitesOf(manager: Manager, teamId: string): Promise<SiteSummary[]> {
  const sites = await sitesOfTeam(manager, teamId);
  const counts = await countsOfSites(
    manager,
    sites.map((site) => site.id),
  );
  return sites.map((site) => summaryOf(site, counts.get(site.id)!));
}

/**
 * A site as the contract shows it.
 * @throws ProblemError `not-found`
 */
export async function siteReply(manager: Manager, siteId: string): Promise<Site> {
  const site = await findSite(manager, siteId);
  if (!site) throw notFound();
  const counts = await countsOfSites(manager, [siteId]);
  return {
    ...summaryOf(site, counts.get(siteId)!),
    crsName: site.crsName,
    layers: (await currentLayers(manager, siteId)).map(layerOf),
    plant: readJson(plantSchema, site.plant),
    plantSet: site.plantSet,
    outlook: readJson(outlookSchema, site.outlook),
    outlookSet: site.outlookSet,
  };
}
