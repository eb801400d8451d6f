import { z } from 'zod';
import { gridSchema } from '#contract/grid.ts';
import {
  elevationCurvesSchema,
  layerPartSchema,
  tidalDatumsSchema,
  type ElevationCurves,
} from '#contract/layers.ts';
import { otherOutlookSchema, outlookSchema } from '#contract/outlooks.ts';
import { plantSchema } from '#contract/plants.ts';
import { type Site, type SiteSummary } from '#contract/sites.ts';
import { gridOf } from '#server/database/site-grid.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { siteRecord } from '#server/specs/drought-record.ts';
import { knownOrigin } from '#server/plants/plant-origin.ts';
import { featuresOfSite } from './features/feature-reply.ts';
import { layerReply } from './layer-reply.ts';
import { currentLayers } from './layer.repository.ts';
import { countsOfSites, findSite, sitesOfTeam, type SiteCounts } from './site.repository.ts';

const partsSchema = z.array(layerPartSchema);

function summaryOf(site: SiteRow, counts: SiteCounts): SiteSummary {
  const { id, teamId, name, invented, createdAt } = site;
  return {
    id,
    teamId,
    name,
    invented,
    createdAt,
    grid: gridOf(site),
    parts: partsSchema.parse(counts.parts),
    options: counts.options,
    runs: counts.runs,
  };
}

const noCurves: ElevationCurves = { capacity: null, vigour: null, exposure: null };

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
  const summary = summaryOf(site, counts.get(siteId)!);
  const plant = readJson(plantSchema, site.plant);
  const { finestGrid, elevationCurves, tidalDatums, otherOutlooks } = site;
  return {
    ...summary,
    crsName: site.crsName,
    finestGrid: finestGrid === null ? summary.grid : readJson(gridSchema, finestGrid),
    layers: (await currentLayers(manager, siteId)).map(layerReply),
    features: await featuresOfSite(manager, siteId),
    elevationCurves: elevationCurves === null ? noCurves : readJson(elevationCurvesSchema, elevationCurves),
    tidalDatums: tidalDatums === null ? [] : readJson(tidalDatumsSchema, tidalDatums),
    plant,
    plantSet: site.plantSet,
    plantOrigin: await knownOrigin(manager, site, plant),
    outlook: readJson(outlookSchema, site.outlook),
    outlookSet: site.outlookSet,
    otherOutlooks: otherOutlooks === null ? [] : readJson(z.array(otherOutlookSchema), otherOutlooks),
    droughtRecord: await siteRecord(manager, siteId),
  };
}
