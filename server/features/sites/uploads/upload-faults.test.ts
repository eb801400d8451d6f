import { rmSync } from 'node:fs';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Site } from '#contract/sites.ts';
import type { Upload } from '#contract/uploads.ts';
import { UploadEntity } from '#server/database/entities/upload.ts';
import { withOtherWorker } from '#server/testing/other-worker.ts';
import { makeTeam, testPassword, type TestTeam } from '#server/testing/people.ts';
import { geoTiff, makeSite, sendUpload, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
beforeEach(async () => {
  server = await testServer();
  team = await makeTeam(server);
  site = await makeSite(team.agents.modeller, team.teamId);
});
afterEach(() => server.close());

const file = geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 50));
const path = (id: string, rest = '') => `/api/teams/${team.teamId}/uploads/${id}${rest}`;
const send = () =>
  sendUpload(team.agents.modeller, team.teamId, file, {
    siteId: site.id,
    part: 'cover',
    place: 'when-clear',
  });
const now = async ({ id }: Upload) => (await team.agents.modeller.get(path(id)).expect(200)).body as Upload;
const coverOf = async () =>
  ((await team.agents.modeller.get(`/api/sites/${site.id}`).expect(200)).body as Site).layers.find(
    ({ part }) => part === 'cover',
  )!;
const idle = () => server.services.background.idle();

describe('work that breaks off', () => {
  it.each(['reading', 'aligning'] as const)(
    'while %s leaves the site as it was, and can be tried again',
    async (stage) => {
      const { modeller } = team.agents;
      let sent: Upload;
      if (stage === 'aligning') {
        sent = await sendUpload(modeller, team.teamId, file, { siteId: site.id, part: 'cover' });
        await idle();
      }
      await withOtherWorker(server, 'dies', async () => {
        if (stage === 'reading') sent = await send();
        else await modeller.post(path(sent.id, '/place')).expect(200);
        await idle();
      });
      expect(await now(sent!)).toMatchObject({
        state: 'failed',
        problem: { code: 'internal', detail: expect.stringContaining('Try again') as string },
      });
      expect((await coverOf()).source.hash).toBe(site.layers[1].source.hash);
      expect(storedFiles(server).arrivals).toEqual([]);
      await modeller.post(path(sent!.id, '/retry')).expect(200);
      await idle();
      const done = await now(sent!);
      expect(done).toMatchObject({ state: 'done', problem: null });
      expect((await coverOf()).id).toBe(done.layerId);
    },
  );

  it('because it was cancelled keeps the file and can be taken up again', async () => {
    const { modeller } = team.agents;
    let sent!: Upload;
    await withOtherWorker(server, 'hangs', async () => {
      sent = await send();
      await expect.poll(async () => (await now(sent)).state).toBe('reading');
      expect((await modeller.post(path(sent.id, '/cancel')).expect(200)).body.state).toBe('cancelled');
      await idle();
    });
    expect(await now(sent)).toMatchObject({ state: 'cancelled', progress: null, problem: null });
    await modeller.post(path(sent.id, '/cancel')).expect(409);
    await modeller.post(path(sent.id, '/retry')).expect(200);
    await idle();
    expect(await now(sent)).toMatchObject({ state: 'done' });
  });

  it('because it was dismissed, or its site deleted, leaves nothing', async () => {
    const { modeller } = team.agents;
    const before = storedFiles(server);
    await withOtherWorker(server, 'hangs', async () => {
      const sent = await send();
      await expect.poll(async () => (await now(sent)).state).toBe('reading');
      await modeller.delete(path(sent.id)).expect(204);
      await modeller.get(path(sent.id)).expect(404);
    });
    expect(storedFiles(server)).toEqual(before);
    await send();
    await modeller.delete(`/api/sites/${site.id}`).expect(204);
    await idle();
    expect(storedFiles(server)).toEqual({ arrivals: [], blobs: [] });
  });
});

describe('a server that ends', () => {
  it('while it works takes the work up again at its next start', async () => {
    let sent!: Upload;
    let folder = '';
    await withOtherWorker(server, 'hangs', async () => {
      sent = await send();
      await expect.poll(async () => (await now(sent)).state).toBe('reading');
      folder = await server.freeze();
    });
    server = await testServer({}, folder);
    rmSync(folder, { recursive: true });
    await idle();
    const agent = server.agent();
    await agent
      .post('/api/session')
      .send({ email: team.people.modeller.email, password: testPassword })
      .expect(200);
    const { body } = await agent.get(path(sent.id)).expect(200);
    expect(body).toMatchObject({ state: 'done' });
    expect(
      (await server.services.dataSource.getRepository(UploadEntity).findOneByOrFail({ id: sent.id }))
        .attempts,
    ).toBe(0);
  });

  it('each time that it begins gives up after the third, and says what to do', async () => {
    const sent = await send();
    await idle();
    // As three ends in the middle of it would have left it.
    await server.services.write((manager) =>
      manager.update(UploadEntity, { id: sent.id }, { state: 'reading', attempts: 3 }),
    );
    const folder = await server.freeze();
    server = await testServer({}, folder);
    rmSync(folder, { recursive: true });
    await idle();
    const row = await server.services.dataSource.getRepository(UploadEntity).findOneByOrFail({ id: sent.id });
    expect(row).toMatchObject({
      state: 'failed',
      problem: expect.stringContaining('begun 3 times') as string,
    });
  });
});
