import type { APIRequestContext } from '@playwright/test';
import { fillPath } from '#contract/endpoint.ts';
import { setClasses, uploadLayer } from '#contract/ground.ts';
import { createOption } from '#contract/options.ts';
import { setOutlook } from '#contract/outlook-endpoints.ts';
import { createSite, setPlant, type Site } from '#contract/sites.ts';
import type { WorkInput } from '#contract/works.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

export interface InventedSite {
  readonly name: string;
  /** cells of 1 m on each side */
  readonly side: number;
  readonly years: number;
  /** cover of a cell at the survey */
  readonly cover: (column: number, row: number) => number;
  /** beside Wait */
  readonly options: readonly {
    readonly name: string;
    readonly works: (grid: Grid) => readonly WorkInput[];
  }[];
}

/** An invented site on even ground, made through the API, under droughts that each future draws for itself. */
export async function inventedSite(
  request: APIRequestContext,
  teamId: string,
  { name, side, years, cover, options }: InventedSite,
): Promise<{ siteId: string; site: Site; cover: Float32Array }> {
  const grid: Grid = {
    width: side,
    height: side,
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
  const standing = Float32Array.from({ length: side * side }, (_, i) =>
    cover(i % side, Math.floor(i / side)),
  );
  const made = await request.post(fillPath(createSite.path, { teamId }), {
    multipart: { name, part: 'habitat', file: raster(new Uint8Array(side * side).fill(1)) },
  });
  if (!made.ok()) throw new Error(await made.text());
  const begun = createSite.reply.parse(await made.json());
  const siteId = begun.id;
  const send = async (method: 'PUT' | 'POST', path: string, data: object): Promise<unknown> => {
    const answer = await request.fetch(path, { method, data });
    if (!answer.ok()) throw new Error(`${path}: ${await answer.text()}`);
    return answer.json();
  };
  await send('PUT', fillPath(setClasses.path, { siteId, layerId: begun.layers[0].id }), {
    classes: [{ value: 1, name: 'Marsh', colour: '#6b7f5a', capacity: 1, vigour: 1 }],
  });
  await request.post(fillPath(uploadLayer.path, { siteId }), {
    multipart: { part: 'cover', file: raster(standing) },
  });
  await send('PUT', fillPath(setPlant.path, { siteId }), {
    name: 'Salt-marsh grass (invented rates)',
    rates: { ...defaultRates, lateralSpread: 1.6, droughtLoss: 1 },
  });
  const site = setOutlook.reply.parse(
    await send('PUT', fillPath(setOutlook.path, { siteId }), {
      surveyYear: 2026,
      years,
      stepsPerYear: 1,
      boundary: 'mirror',
      droughtIndex: Array.from({ length: years }, () => 0),
      drawn: {
        kind: 'renewal',
        returnInterval: { law: 'exponential', mean: 14 },
        sinceLatest: 2,
        depth: -3,
        length: { law: 'fixed', years: 1 },
      },
    }),
  );
  for (const option of options)
    await send('POST', fillPath(createOption.path, { siteId }), {
      name: option.name,
      works: option.works(grid),
    });
  return { siteId, site, cover: standing };
}
