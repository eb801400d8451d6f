import { execFile, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { unzipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Site } from '#contract/sites.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import { projectRoot } from '#server/project.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { computeRun, openRun, sendRun, specFor } from '#server/testing/runs.ts';
import { cover, habitat, makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { makeToken } from '#server/testing/tokens.ts';

/** The examples of docs/api.md, run as a script author would, against a server on loopback. */
const examples = join(projectRoot, 'docs/examples');
let server: TestServer;
let listening: Server;
let team: TestTeam;
let url: string;
let folder: string;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Marsh team');
  listening = server.app.listen(0, '127.0.0.1');
  await new Promise((ready) => listening.once('listening', ready));
  url = `http://127.0.0.1:${(listening.address() as AddressInfo).port}`;
  folder = mkdtempSync(join(tmpdir(), 'foothold-example-'));
  writeFileSync(join(folder, 'habitat.tif'), habitat());
  writeFileSync(join(folder, 'cover.tif'), cover());
});
afterAll(async () => {
  await new Promise((closed) => listening.close(closed));
  await server.close();
  rmSync(folder, { recursive: true, force: true });
});

const token = async (scope: 'read' | 'write') =>
  (await makeToken(server, team.people.modeller.id, { scope })).token;

/** Runs a script in the folder with the rasters; its exit code and all that it said. */
const run = (command: string, argv: string[], secret: string) =>
  new Promise<{ code: number; said: string }>((done) => {
    const env = { PATH: process.env.PATH, HOME: process.env.HOME, FOOTHOLD_TOKEN: secret };
    execFile(command, argv, { cwd: folder, env }, (error, stdout, stderr) =>
      done({ code: error ? Number(error.code) : 0, said: stdout + stderr }),
    );
  });

const languages = [
  ['Python', 'python3', 'run_site.py'],
  ['R', 'Rscript', 'run_site.R'],
] as const;
const isThere = (command: string) => spawnSync(command, ['--version']).status === 0;

describe.each(languages)('the example in %s', (language, command, file) => {
  const script = join(examples, file);
  const inOut = (...path: string[]) => join(folder, `out-${command}`, ...path);
  const settings = join(examples, 'settings.json');

  test('makes a site, and simulates it to the digest that the engine comes to', async (context) => {
    if (!isThere(command))
      context.skip(`${command} is not installed, so the example in ${language} did not run`);
    const argv = [script, 'site', url, 'habitat.tif', 'cover.tif', settings, inOut()];
    const { code, said } = await run(command, [...argv, '--product', projectRoot], await token('write'));
    expect(said).toContain('simulated; digest');
    expect(code).toBe(0);
    const id = /made the site (\S+)/.exec(said)![1];
    const site = (await team.agents.modeller.get(`/api/sites/${id}`).expect(200)).body as Site;
    const wanted = JSON.parse(readFileSync(settings, 'utf8')) as {
      classes: object[];
      plant: { rates: object };
      outlook: { years: number; surveyYear: number; droughtIndex: number[] };
      seed: string;
    };
    expect(site.layers[0].classes).toEqual(wanted.classes);
    expect(site.plant.rates).toMatchObject(wanted.plant.rates);
    expect(site.outlook).toMatchObject(wanted.outlook);
    const { years, surveyYear, droughtIndex } = wanted.outlook;
    const { rates } = site.plant;
    const spec = specFor(site, { seed: wanted.seed, years, surveyYear, droughtIndex, rates });
    const { result } = await computeRun(site, spec);
    const summary = JSON.parse(readFileSync(inOut('result', 'summary.json'), 'utf8')) as { digest: string };
    expect(summary.digest).toBe(result.digest);
  }, 120_000);

  test('fetches what is stored of a run, by a token that may only read', async (context) => {
    if (!isThere(command))
      context.skip(`${command} is not installed, so the example in ${language} did not run`);
    const agent = team.agents.modeller;
    const site = await makeSite(agent, team.teamId);
    const computed = await computeRun(site, specFor(site));
    const { id } = await openRun(agent, site, specFor(site));
    const fetchRun = async () => run(command, [script, 'fetch', url, id, inOut()], await token('read'));
    const early = await fetchRun();
    expect(early.code).toBe(1);
    expect(early.said).toContain('The run is running');
    expect((await sendRun(agent, id, computed)).status).toBe(200);
    expect(await fetchRun()).toMatchObject({ code: 0 });
    expect(Object.keys(unzipSync(readFileSync(inOut('files.zip'))))).toContain('spec.json');
    expect(readFileSync(inOut('series.csv'), 'utf8').trim().split('\r\n')).toHaveLength(6);
    const closing = await readRaster(readFileSync(inOut('closing.tif')));
    expect([...closing.values]).toEqual([...computed.closing]);
    expect((await readRaster(readFileSync(inOut('cover-2028.tif')))).grid.width).toBe(6);
  }, 120_000);

  test('says in words why it is refused', async (context) => {
    if (!isThere(command))
      context.skip(`${command} is not installed, so the example in ${language} did not run`);
    const argv = [script, 'site', url, 'habitat.tif', 'cover.tif', settings, inOut()];
    const reading = await run(command, argv, await token('read'));
    expect(reading.code).toBe(1);
    expect(reading.said).toContain('may only read');
    const unknown = await run(command, argv, 'fh_nothing');
    expect(unknown.code).toBe(1);
    expect(unknown.said).toContain('not known here');
  }, 120_000);
});
