import type { Page } from '@playwright/test';
import { fillPath } from '#contract/endpoint.ts';
import { setClasses, uploadLayer } from '#contract/ground.ts';
import { createOption } from '#contract/options.ts';
import { setOutlook } from '#contract/outlook-endpoints.ts';
import { createSite, setPlant } from '#contract/sites.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

const grid: Grid = {
  width: 60,
  height: 60,
  cellSize: 1,
  originX: 500_000,
  originY: 4_000_000,
  epsg: 32617,
};
const raster = (values: Uint8Array | Float32Array) => ({
  name: 'raster.tif',
  mimeType: 'image/tiff',
  buffer: Buffer.from(encodeGeoTiff({ grid, values })),
});

/** An invented site of 60 × 60 cells, made through the API: a strip stands in the west, one option plants the middle. */
export async function smallSite(page: Page, teamId: string, name: string) {
  const { request } = page;
  const habitat = raster(new Uint8Array(grid.width * grid.height).fill(1));
  const cover = raster(
    Float32Array.from({ length: grid.width * grid.height }, (_, i) => (i % grid.width < 12 ? 0.8 : 0)),
  );
  const made = await request.post(fillPath(createSite.path, { teamId }), {
    multipart: { name, part: 'habitat', file: habitat },
  });
  if (!made.ok()) throw new Error(await made.text());
  const site = createSite.reply.parse(await made.json());
  const siteId = site.id;
  const send = async (method: 'PUT' | 'POST', path: string, data: object): Promise<unknown> => {
    const answer = await request.fetch(path, { method, data });
    if (!answer.ok()) throw new Error(`${path}: ${await answer.text()}`);
    return answer.json();
  };
  await send('PUT', fillPath(setClasses.path, { siteId, layerId: site.layers[0].id }), {
    classes: [{ value: 1, name: 'Marsh', colour: '#6b7f5a', capacity: 1, vigour: 1 }],
  });
  await request.post(fillPath(uploadLayer.path, { siteId }), { multipart: { part: 'cover', file: cover } });
  await send('PUT', fillPath(setPlant.path, { siteId }), {
    name: 'Salt-marsh grass (invented rates)',
    rates: { ...defaultRates, lateralSpread: 1.6, droughtLoss: 1 },
  });
  await send('PUT', fillPath(setOutlook.path, { siteId }), {
    surveyYear: 2026,
    years: 20,
    stepsPerYear: 1,
    boundary: 'mirror',
    droughtIndex: Array.from({ length: 20 }, () => 0),
    drawn: {
      kind: 'renewal',
      returnInterval: { law: 'exponential', mean: 14 },
      sinceLatest: 2,
      depth: -3,
      length: { law: 'fixed', years: 1 },
    },
  });
  const points = [20, 32, 44, 56].flatMap((x) =>
    [8, 23, 38, 53].map((y) => [grid.originX + x, grid.originY - y]),
  );
  await send('POST', fillPath(createOption.path, { siteId }), {
    name: 'Clumps',
    works: [{ kind: 'clumps', year: 2027, points, each: 6 }],
  });
  return siteId;
}
