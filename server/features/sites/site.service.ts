import type { ElevationCurves, TidalDatum } from '#contract/layers.ts';
import type { SitePlant } from '#contract/plants.ts';
import type { Site } from '#contract/sites.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { releaseBlobs, storeWithRows } from '#server/files/stored-files.ts';
import { fieldProblem, notFound } from '#server/middleware/problem-error.ts';
import { profileOf } from '#server/plants/plant-origin.ts';
import type { Services } from '#server/services.ts';
import { insertLayer } from './layer.repository.ts';
import { layerRowOf } from './layer.service.ts';
import { newSiteRows } from './new-site.ts';
import { readRasterFile, type ArrivedRaster } from './read-raster-file.ts';
import { siteReply } from './site-reply.ts';
import { deleteSiteRows, findSite, insertSite, updateSite } from './site.repository.ts';

/**
 * Makes a site whose working grid is the raster's, with the option `Wait`, a default plant and a default outlook. A
 * refused raster leaves nothing behind.
 * @throws ProblemError what is wrong with the raster
 */
export async function createSite(
  services: Services,
  {
    teamId,
    name,
    invented = false,
    ...raster
  }: ArrivedRaster & { teamId: string; name: string; invented?: boolean },
): Promise<Site> {
  if (raster.part === 'resurvey')
    throw fieldProblem('part', 'A resurvey comes later: make the site from its habitat or cover first');
  const read = await readRasterFile(services, raster.file, raster.part);
  const { grid, facts } = read;
  const now = services.clock();
  const rows = newSiteRows({ teamId, name, by: raster.by, grid, crsName: facts.crsName, now, invented });
  const layer = layerRowOf(rows.site.id, raster, read, now.toISOString());
  return storeWithRows(services, [raster.file, read.values], async (manager) => {
    await insertSite(manager, rows);
    await insertLayer(manager, layer);
    return siteReply(manager, rows.site.id);
  });
}

const changeSite = (services: Services, siteId: string, change: Partial<SiteRow>): Promise<Site> =>
  services.write(async (manager) => {
    await updateSite(manager, siteId, change);
    return siteReply(manager, siteId);
  });

export const renameSite = (services: Services, siteId: string, name: string): Promise<Site> =>
  changeSite(services, siteId, { name });

/**
 * Sets the plant of a site, and the profile that it was taken from where that is told.
 * @throws ProblemError at `origin` where the team has no such profile
 */
export const setPlant = (
  services: Services,
  siteId: string,
  { origin, ...plant }: SitePlant,
): Promise<Site> =>
  services.write(async (manager) => {
    const site = await findSite(manager, siteId);
    if (!site) throw notFound();
    if (origin && !(await profileOf(manager, site.teamId, origin)))
      throw fieldProblem('origin', 'There is no such profile in this team, or no such version of it');
    await updateSite(manager, siteId, {
      plant: JSON.stringify(plant),
      plantSet: true,
      ...(origin !== undefined && { plantOrigin: origin && JSON.stringify(origin) }),
    });
    return siteReply(manager, siteId);
  });

/** Says what elevation does on a site, and which levels of the tide are drawn beside it. */
export const setElevationCurves = (
  services: Services,
  siteId: string,
  { elevationCurves, tidalDatums }: { elevationCurves: ElevationCurves; tidalDatums: TidalDatum[] },
): Promise<Site> =>
  changeSite(services, siteId, {
    elevationCurves: JSON.stringify(elevationCurves),
    tidalDatums: JSON.stringify(tidalDatums),
  });

/** Deletes a site with its layers, options and runs, and every file that nothing else refers to. */
export async function deleteSite(services: Services, siteId: string): Promise<void> {
  const hashes = await services.write((manager) => deleteSiteRows(manager, siteId));
  await releaseBlobs(services, hashes);
}
