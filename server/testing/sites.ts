import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import type { LayerPart } from '#contract/layers.ts';
import type { Upload } from '#contract/uploads.ts';
import type { Site } from '#contract/sites.ts';
import { encodeGeoTiff, type GeoTiffContent } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { Agent } from './people.ts';
import type { TestServer } from './test-server.ts';

/** 6 × 4 cells of 2 m. */
export const smallGrid: Grid = {
  width: 6,
  height: 4,
  cellSize: 2,
  originX: 412_200,
  originY: 5_301_900,
  epsg: 32631,
};

/** A GeoTIFF on `smallGrid` unless another grid is given. */
export const geoTiff = (values: GeoTiffContent['values'], content: Partial<GeoTiffContent> = {}): Buffer =>
  Buffer.from(encodeGeoTiff({ grid: smallGrid, values, crsName: 'WGS 84 / UTM zone 31N', ...content }));

/** Classes 1 and 2, with one cell of no data (0). */
export const habitat = (): Buffer =>
  geoTiff(
    Uint8Array.from({ length: 24 }, (_, i) => (i === 5 ? 0 : 1 + (i % 2))),
    { noData: 0 },
  );

/** Shares 0, 0.04 … 0.92. */
export const cover = (): Buffer => geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 25));

/** A class table for `habitat`. */
export const classes = [
  { value: 1, name: 'Low platform', colour: '#5b825a', capacity: 1, vigour: 1 },
  { value: 2, name: 'Bank', colour: '#a7a58f', capacity: 0.8, vigour: 0.5 },
];

export const uploadSite = (
  agent: Agent,
  teamId: string,
  part: LayerPart,
  file: Buffer,
  name = 'Trial Marsh',
) =>
  agent
    .post(`/api/teams/${teamId}/sites`)
    .field('name', name)
    .field('part', part)
    .attach('file', file, `${part}.tif`);

export const uploadLayer = (
  agent: Agent,
  siteId: string,
  part: LayerPart,
  file: Buffer,
  fileName = `${part}.tif`,
) => agent.post(`/api/sites/${siteId}/layers`).field('part', part).attach('file', file, fileName);

/** Sends a raster as an upload; it is read in the background. */
export async function sendUpload(
  agent: Agent,
  teamId: string,
  file: Buffer,
  {
    fileName = 'raster.tif',
    ...fields
  }: { siteId?: string; part?: LayerPart; place?: string; fileName?: string } = {},
): Promise<Upload> {
  const request = agent.post(`/api/teams/${teamId}/uploads`);
  for (const [name, value] of Object.entries(fields)) void request.field(name, value);
  const reply = await request.attach('file', file, fileName).expect(200);
  return reply.body as Upload;
}

/** A site with `habitat` (classed) and `cover`. */
export async function makeSite(agent: Agent, teamId: string): Promise<Site> {
  const { body } = (await uploadSite(agent, teamId, 'habitat', habitat()).expect(200)) as { body: Site };
  await uploadLayer(agent, body.id, 'cover', cover()).expect(200);
  const reply = await agent
    .put(`/api/sites/${body.id}/layers/${body.layers[0].id}/classes`)
    .send({ classes })
    .expect(200);
  return reply.body as Site;
}

/** Every file among the arrivals and the blobs of a server. */
export function storedFiles({ services }: TestServer): { arrivals: string[]; blobs: string[] } {
  const list = (folder: string) =>
    readdirSync(join(services.config.dataDir, folder), { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map((entry) => entry.name)
      .sort();
  return { arrivals: list('incoming'), blobs: list('blobs') };
}
