import type { z } from 'zod';
import type * as contract from '#contract/option-files.ts';
import type { WorksPreview } from '#contract/option-files.ts';
import { outlookSchema } from '#contract/outlooks.ts';
import { mostWorks } from '#contract/works.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { safeFileName } from '#server/files/file-name.ts';
import { fieldProblem, notFound } from '#server/middleware/problem-error.ts';
import type { BytesReply } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { optionOf } from '../option-reply.ts';
import { findOption, findSite } from '../option.repository.ts';
import { crewCsv } from './crew-csv.ts';
import { crewGpx, type DegreePoint } from './crew-gpx.ts';
import { crewPoints } from './crew-stops.ts';
import { projectionBetween, wgs84 } from '#server/files/place-projection.ts';
import { pointsCsv } from './points-csv.ts';
import { readGeoJson } from './read-geojson.ts';
import { readPointsCsv } from './read-points-csv.ts';
import { optionGeoJson } from './write-geojson.ts';

interface OptionAddress {
  siteId: string;
  optionId: string;
}
type Round = z.output<typeof contract.exportCrewGpx.query>;

async function optionWithSite(manager: Manager, { siteId, optionId }: OptionAddress) {
  const [row, site] = await Promise.all([findOption(manager, siteId, optionId), findSite(manager, siteId)]);
  if (!row || !site) throw notFound();
  return { option: optionOf(row), site };
}

/** An option as GeoJSON. */
export async function exportGeoJson(
  manager: Manager,
  address: OptionAddress,
  crs: 'wgs84' | 'site',
): Promise<BytesReply> {
  const { option, site } = await optionWithSite(manager, address);
  const text = JSON.stringify(optionGeoJson(option, site.epsg, crs));
  return download(text, 'application/geo+json', [site.name, option.name], 'geojson');
}

/** The works of an option that are points, as CSV. */
export async function exportPoints(manager: Manager, address: OptionAddress): Promise<BytesReply> {
  const { option, site } = await optionWithSite(manager, address);
  return download(pointsCsv(option.works), csvType, [site.name, option.name, 'points'], 'csv');
}

/** The points for a crew, as GPX or CSV. @throws ProblemError `not-found` without any, `too-large` for too many */
export async function exportCrew(
  { dataSource, clock }: Services,
  address: OptionAddress,
  { year, startX, startY }: Round,
  format: 'gpx' | 'csv',
): Promise<BytesReply> {
  const { option, site } = await optionWithSite(dataSource.manager, address);
  const start = startX === undefined || startY === undefined ? undefined : ([startX, startY] as const);
  const { fromSite } = projectionBetween(wgs84, site.epsg);
  const points = crewPoints(option.works, year, start).map((point): DegreePoint => ({
    ...point,
    degrees: fromSite(point.place),
  }));
  const when = year === undefined ? [] : [year];
  const name = [site.name, option.name, ...when, 'crew'];
  if (format === 'csv') return download(crewCsv(points), csvType, name, 'csv');
  const title = [site.name, option.name, ...when].join(', ');
  return download(crewGpx(points, title, describe(site), clock()), 'application/gpx+xml', name, 'gpx');
}

const csvType = 'text/csv; charset=utf-8; header=present';

const describe = ({ invented }: SiteRow) =>
  `${invented ? 'Invented demo data. ' : ''}Planned places, no survey: a receiver may be metres off. Work between the tides ` +
  'needs tide, weather and mud precautions; moving bivalves or plants can need permits and biosecurity checks. Follow local ' +
  'codes and licensed practice.';

const download = (text: string, type: string, name: (string | number)[], extension: string): BytesReply => ({
  bytes: Buffer.from(text, 'utf8'),
  type,
  fileName: safeFileName(name, extension),
});

/** What a file with works holds. Nothing is saved. @throws ProblemError at `content` for a file that cannot be read at all */
export async function previewWorks(
  manager: Manager,
  siteId: string,
  { fileName, content }: { fileName: string; content: string },
): Promise<WorksPreview> {
  const site = await findSite(manager, siteId);
  if (!site) throw notFound();
  const firstYear = readJson(outlookSchema, site.outlook).surveyYear + 1;
  const isJson = /\.(geo)?json$/i.test(fileName) || /^\uFEFF?\s*[{[]/.test(content);
  const { found, ...file } = (isJson ? readGeoJson : readPointsCsv)(content, site, firstYear);
  if (found.works.length > mostWorks)
    throw fieldProblem('content', `Found ${found.works.length} works; one option holds at most ${mostWorks}`);
  const { works, problems, moreProblems } = found;
  return {
    ...file,
    sets: [...file.sets],
    works,
    problems,
    moreProblems,
    assumed: [...found.assumed].map(([words, count]) => ({ words, works: count })),
  };
}
