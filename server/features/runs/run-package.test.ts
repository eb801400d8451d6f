import { mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { strFromU8, unzipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Run } from '#contract/runs.ts';
import type { Site } from '#contract/sites.ts';
import { simulate } from '#server/commands/simulate/command.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { computeRun, openRun, sendRun, specFor } from '#server/testing/runs.ts';
import { cover, geoTiff, habitat, makeSite, sendUpload } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let run: Run;
let folder: string;
/** the cover as it came: one row and one column more than the site has */
const uploaded = geoTiff(
  Float32Array.from({ length: 35 }, (_, i) => i / 40),
  { grid: { width: 7, height: 5, cellSize: 2, originX: 412_200, originY: 5_301_900, epsg: 32631 } },
);

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server);
  const { modeller } = team.agents;
  const { id: siteId } = await makeSite(modeller, team.teamId);
  const fields = { siteId, part: 'cover', fileName: 'cover.tif' } as const;
  const sent = await sendUpload(modeller, team.teamId, uploaded, fields);
  await server.services.background.idle();
  await modeller.post(`/api/teams/${team.teamId}/uploads/${sent.id}/place`).expect(200);
  await server.services.background.idle();
  site = (await modeller.get(`/api/sites/${siteId}`).expect(200)).body as Site;
  const spec = specFor(site, { droughtIndex: [0, -3, 0, 0] });
  run = await openRun(team.agents.manager, site, spec, 'Wait, by files');
  const raster = (await download(`/api/sites/${site.id}/layer-files/${layerOf('cover').hash}`)).body;
  const computed = await computeRun(site, spec, [habitat(), raster as Buffer]);
  await sendRun(team.agents.manager, run.id, computed);
});
afterAll(() => server.close());

const layerOf = (part: string) => site.layers.find((layer) => layer.part === part)!;
const download = (path: string) => binaryReply(team.agents.trainer.get(path)).expect(200);

/** Unpacks the archive, changes what a test changes, and runs the spec. */
async function repeat(change: (files: Record<string, Uint8Array>) => void = () => undefined) {
  const files = unzipSync((await download(`/api/runs/${run.id}/files.zip`)).body as Buffer);
  change(files);
  folder = await mkdtemp(join(tmpdir(), 'foothold-package-'));
  try {
    for (const [path, bytes] of Object.entries(files)) {
      await mkdir(dirname(join(folder, path)), { recursive: true });
      await writeFile(join(folder, path), bytes);
    }
    let said = '';
    const code = await simulate(['spec.json', '--out', 'result'], {
      folder,
      dataDir: join(folder, 'data'),
      print: () => undefined,
      progress: { write: (text) => (said += text), isTerminal: false, now: () => 0 },
    });
    const summary = code === 0 ? await readFile(join(folder, 'result', 'summary.json'), 'utf8') : '{}';
    return { code, said, digest: (JSON.parse(summary) as { digest?: string }).digest, files };
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}
const onGrid = 'rasters/cover-on-grid.tif';

describe('the files of a run', () => {
  it('come to the same digest on the command line, as they are unpacked', async () => {
    expect(layerOf('cover').hash).not.toBe(layerOf('cover').source.hash);
    const { code, digest, files } = await repeat();
    const finished = (await team.agents.trainer.get(`/api/runs/${run.id}`).expect(200)).body as Run;
    expect([code, digest]).toEqual([0, finished.digest]);
    expect(Object.keys(files)).toEqual(['README.txt', 'spec.json', 'rasters/habitat.tif', onGrid]);
    const words = strFromU8(files['README.txt']);
    expect(words).toContain(finished.digest);
    expect(words).toContain(`SHA-256 as it came ${layerOf('cover').source.hash}`);
    expect(finished.layers.find(({ part }) => part === 'cover')).toMatchObject({
      hash: layerOf('cover').hash,
      sourceHash: layerOf('cover').source.hash,
    });
  });

  it('are refused with one byte changed, or another file in the place of a raster', async () => {
    const changed = await repeat((files) => (files[onGrid][files[onGrid].length - 1] ^= 1));
    expect(changed.code).toBe(1);
    expect(changed.said).toContain('layers.cover.sha256');
    expect(changed.said).toContain(`expected ${layerOf('cover').hash}`);
    const swapped = await repeat((files) => (files[onGrid] = uploaded));
    expect(swapped.code).toBe(1);
    expect(swapped.said).toContain(`found a file with the SHA-256 ${layerOf('cover').source.hash}`);
    const other = await repeat((files) => (files[onGrid] = cover()));
    expect(other.code).toBe(1);
  });

  it('run on other files once the spec says nothing of hashes', async () => {
    const { code, digest } = await repeat((files) => {
      const spec = strFromU8(files['spec.json']).replace(/,\s*"sha256": "\w+"/g, '');
      files['spec.json'] = Buffer.from(spec);
      files[onGrid] = cover();
    });
    expect(code).toBe(0);
    const finished = (await team.agents.trainer.get(`/api/runs/${run.id}`).expect(200)).body as Run;
    expect(digest).not.toBe(finished.digest);
  });

  it('come as the spec alone, the same as in the archive', async () => {
    const reply = await download(`/api/runs/${run.id}/spec.json`);
    expect(reply.headers['content-disposition']).toContain('Trial-Marsh_Wait-by-files_spec.json');
    const { files } = await repeat();
    expect((reply.body as Buffer).toString()).toBe(strFromU8(files['spec.json']));
  });

  it('cannot be named by file on the server, which says what to name instead', async () => {
    const spec = JSON.parse(
      ((await download(`/api/runs/${run.id}/spec.json`)).body as Buffer).toString(),
    ) as object;
    const { body } = await team.agents.manager
      .post(`/api/sites/${site.id}/runs`)
      .send({ name: 'by file', optionId: run.optionId, spec })
      .expect(400);
    expect(JSON.stringify(body)).toContain(`\\"layer\\": \\"${layerOf('cover').hash}\\"`);
  });
});
