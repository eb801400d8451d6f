import { execFileSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Run } from '#contract/runs.ts';
import type { Site } from '#contract/sites.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { computeRun, openRun, sendRun, specFor, type ComputedRun } from '#server/testing/runs.ts';
import { makeSite, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let run: Run;
let computed: ComputedRun;

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server);
  site = await makeSite(team.agents.modeller, team.teamId);
  const spec = specFor(site, { droughtIndex: [0, -3, 0, 0] });
  computed = await computeRun(site, spec);
  run = await openRun(team.agents.manager, site, spec, '40 mounds, “scattered”');
  await sendRun(team.agents.manager, run.id, computed);
});
afterAll(() => server.close());

const download = (path: string) =>
  binaryReply(team.agents.trainer.get(`/api/runs/${run.id}/${path}`)).expect(200);

/** What GDAL says of a file, or undefined where it is not installed. */
function gdalinfo(bytes: Buffer): Record<string, unknown> | undefined {
  const file = join(server.services.config.dataDir, 'exported.tif');
  writeFileSync(file, bytes);
  try {
    return JSON.parse(execFileSync('gdalinfo', ['-json', file], { encoding: 'utf8' })) as Record<
      string,
      unknown
    >;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
}

describe('exports', () => {
  it('the series as CSV, under a name that reads well', async () => {
    const reply = await download('series.csv');
    expect(reply.headers['content-disposition']).toBe(
      'attachment; filename=Trial-Marsh_40-mounds-scattered_series.csv',
    );
    expect(reply.headers['content-type']).toContain('text/csv');
    const lines = (reply.body as Buffer).toString('utf8').split('\r\n');
    expect(lines).toHaveLength(5 + 2);
    expect(lines[0]).toMatch(/^time_year,drought_index,covered_area_m2/);
    const [time, drought, covered] = lines[3].split(',').map(Number);
    expect([time, drought, covered]).toEqual([2026, -3, computed.result.series[2].coveredArea]);
    expect(lines[1]).toMatch(/^2024,,/);
  });

  it('a frame as shares, with no data where the plant cannot grow', async () => {
    const reply = await download('cover/2026');
    expect(reply.headers['content-disposition']).toContain('Trial-Marsh_40-mounds-scattered_cover_2026.tif');
    const raster = await readRaster(reply.body as Buffer);
    expect(raster).toMatchObject({ grid: site.grid, dataType: 'float32', noData: -9999 });
    // Cell 5 of the habitat has no class.
    const expected = Float32Array.from(computed.frames.get(2026)!, (k, i) => (i === 5 ? -9999 : k / 255));
    expect(raster.values).toEqual(expected);
    expect((reply.body as Buffer).toString('latin1')).toContain('rounded to steps of 1/255');
  });

  it('the closing years, 0 for what is still open', async () => {
    const file = (await download('closing.tif')).body as Buffer;
    expect(file.toString('latin1')).toContain('closing year, 0 = open at the horizon');
    const raster = await readRaster(file);
    expect(raster).toMatchObject({ grid: site.grid, dataType: 'int16', noData: -32_768 });
    expect(raster.values).toEqual(computed.closing);
    expect(computed.closing[5]).toBe(-32_768);
  });

  it('as GDAL reads them: CRS, origin, cell size, no data', async (context) => {
    const cover = gdalinfo((await download('cover/2028')).body as Buffer);
    if (!cover) return context.skip('gdalinfo is not installed');
    const place = { size: [6, 4], geoTransform: [412_200, 2, 0, 5_301_900, 0, -2] };
    expect(cover).toMatchObject({ ...place, bands: [{ type: 'Float32', noDataValue: -9999 }] });
    expect(JSON.stringify(cover)).toContain('ID[\\"EPSG\\",32631]');
    const closing = gdalinfo((await download('closing.tif')).body as Buffer);
    expect(closing).toMatchObject({ ...place, bands: [{ type: 'Int16', noDataValue: -32_768 }] });
  });

  it('leave nothing among the arrivals, and a year without a frame is not found', async () => {
    await download('cover/2024');
    for (let i = 0; i < 100 && storedFiles(server).arrivals.length > 0; i++)
      await new Promise((resolve) => setTimeout(resolve, 20));
    expect(storedFiles(server).arrivals).toEqual([]);
    await team.agents.trainer.get(`/api/runs/${run.id}/cover/2050`).expect(404);
  });
});
