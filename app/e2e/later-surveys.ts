import type { APIRequestContext } from '@playwright/test';
import { fillPath } from '#contract/endpoint.ts';
import { uploadLayer } from '#contract/ground.ts';
import type { Site } from '#contract/sites.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { runReplicate } from '#sim-core/ensemble/replicate.ts';
import { defaultRates, type Rates } from '#sim-core/spec/parameters.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';

/** Resurveys of an invented site as a run with these rates leads to, under near normal weather, put on the site. */
export async function laterSurveys(
  request: APIRequestContext,
  site: Site,
  cover: Float32Array,
  years: readonly number[],
  rates: Partial<Rates>,
): Promise<void> {
  const { id: siteId, grid } = site;
  const cells = grid.width * grid.height;
  const spec = runSpecSchema.parse({
    version: 1,
    seed: 'what really happened',
    surveyYear: site.outlook.surveyYear,
    years: Math.max(...years) - site.outlook.surveyYear,
    rates: { ...defaultRates, droughtLoss: 1, ...rates },
    layers: { cover: { file: 'invented.tif' } },
  });
  const ground = {
    capacity: new Uint8Array(cells).fill(255),
    vigour: new Uint8Array(cells).fill(255),
    exposure: new Uint8Array(cells),
    refuge: new Uint8Array(cells),
    fence: new Uint8Array(cells),
    cover,
  };
  const { covers } = runReplicate({ spec, grid, ground }, { closing: false, coverYears: years });
  for (const [year, values] of covers) {
    const answer = await request.post(fillPath(uploadLayer.path, { siteId }), {
      multipart: {
        part: 'resurvey',
        year: String(year),
        file: {
          name: `resurvey-${year}.tif`,
          mimeType: 'image/tiff',
          buffer: Buffer.from(encodeGeoTiff({ grid, values })),
        },
      },
    });
    if (!answer.ok()) throw new Error(await answer.text());
  }
}
