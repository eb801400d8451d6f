import { z } from 'zod';
import { endpoint, id, text } from './endpoint.ts';
import { workSchema, workSetSchema } from './works.ts';

const siteParams = z.object({ siteId: id });
const optionParams = z.object({ siteId: id, optionId: id });
const number = z.coerce.number();

/** The largest file with works that can be read, bytes. */
export const largestWorksFile = 16 * 1024 * 1024;

/** Points of one hand-out to a crew: more is no list for people, and slow in a hand-held receiver. */
export const mostCrewPoints = 5000;

/** `docs/option-geojson.md` says what stands in it. */
export const exportGeoJson = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/options/:optionId/option.geojson',
  summary: 'An option as GeoJSON: in WGS 84, or in the CRS of the site',
  params: optionParams,
  query: z.object({ crs: z.enum(['wgs84', 'site']).default('wgs84') }),
  replyKind: 'bytes',
  replyType: 'application/geo+json',
});
export const exportPoints = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/options/:optionId/points.csv',
  summary: 'The works of an option that are points, as CSV in the CRS of the site',
  params: optionParams,
  replyKind: 'bytes',
  replyType: 'text/csv',
});

/** Which points go to the crew: those of one year, or all; and where the round starts, or at its western end. */
const roundQuery = z.object({
  year: number.int().optional(),
  startX: number.optional(),
  startY: number.optional(),
});
export const exportCrewGpx = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/options/:optionId/crew.gpx',
  summary: 'The points for a crew as GPX 1.1 in WGS 84, in the order of a short round',
  params: optionParams,
  query: roundQuery,
  replyKind: 'bytes',
  replyType: 'application/gpx+xml',
});
export const exportCrewCsv = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/options/:optionId/crew.csv',
  summary: 'The points for a crew as CSV in WGS 84, in the order of a short round',
  params: optionParams,
  query: roundQuery,
  replyKind: 'bytes',
  replyType: 'text/csv',
});

/** What a file with works holds, before anything is saved. */
export const worksPreviewSchema = z.object({
  format: z.enum(['geojson', 'csv']),
  /** name of the CRS that its coordinates were read in */
  crsName: z.string(),
  /** for the option, from the file where it says so */
  name: z.string(),
  note: z.string(),
  works: z.array(workSchema),
  sets: z.array(workSetSchema),
  /** what could not be read; nothing of these rows or features is among the works */
  problems: z.array(
    z.object({
      /** line of a CSV file as an editor counts it, or number of a feature from 1; null for the file as a whole */
      row: z.number().int().nullable(),
      message: z.string(),
    }),
  ),
  /** what the file does not say and was taken for granted, with the number of works that it concerns */
  assumed: z.array(z.object({ words: z.string(), works: z.number().int() })),
  /** problems beside those listed */
  moreProblems: z.number().int(),
});
export type WorksPreview = z.infer<typeof worksPreviewSchema>;
export const readWorks = endpoint({
  method: 'POST',
  path: '/api/sites/:siteId/works-preview',
  summary: 'Read a GeoJSON or CSV file with works; saves nothing',
  params: siteParams,
  body: z.strictObject({ fileName: text(255), content: z.string() }),
  reply: worksPreviewSchema,
});
