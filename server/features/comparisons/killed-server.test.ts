import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import supertest from 'supertest';
import { afterAll, expect, it } from 'vitest';
import type { Comparison } from '#contract/comparisons.ts';
import type { Session } from '#contract/people.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { replicateOf, startTestComparison } from '#server/testing/comparisons.ts';
import type { Agent } from '#server/testing/people.ts';
import { packed, sendBytes } from '#server/testing/runs.ts';
import { makeSite } from '#server/testing/sites.ts';
import { freePort, startServer } from '#server/testing/started-server.ts';

const dataDir = mkdtempSync(join(tmpdir(), 'foothold-killed-'));
afterAll(() => rmSync(dataDir, { recursive: true, force: true }));
const admin = { email: 'ada@killed.example', password: 'a long enough one' };

it('loses nothing that it has acknowledged when it is killed in the middle of an ensemble', async () => {
  const port = String(await freePort());
  const start = async () => {
    const started = startServer(dataDir, {
      PORT: port,
      ADMIN_EMAIL: admin.email,
      ADMIN_PASSWORD: admin.password,
    });
    await started.said(/Foothold is ready at/);
    const agent = supertest.agent(`http://127.0.0.1:${port}`);
    await agent.post('/api/session').send(admin).expect(200);
    return { ...started, agent };
  };
  const first = await start();
  const { memberships } = (await first.agent.get('/api/session').expect(200)).body as Session;
  const site = await makeSite(first.agent, memberships[0].teamId);
  const comparison = await startTestComparison(first.agent, site, { replicates: 500 });
  const path = `/api/sites/${site.id}/comparisons/${comparison.id}`;
  const map = `${path}/ensembles/0/0/maps/chance-2026?replicates=4`;
  await sendBytes(first.agent, map, packed(new Uint8Array(24).fill(9))).expect(204);

  // Pieces follow each other until the server falls in the middle of one.
  const acknowledged: number[] = [];
  const send = (agent: Agent, from: number) =>
    agent
      .put(`${path}/ensembles/0/0/replicates`)
      .send({ replicates: [0, 1, 2, 3].map((i) => replicateOf(from + i)) });
  const sending = (async () => {
    for (let from = 0; from < 480; from += 4) {
      await send(first.agent, from).expect(200);
      acknowledged.push(from, from + 1, from + 2, from + 3);
      if (acknowledged.length === 80) first.child.kill('SIGKILL');
    }
  })();
  await expect(sending).rejects.toThrow();
  await first.ended;
  expect(acknowledged.length).toBeGreaterThanOrEqual(80);
  expect(acknowledged.length).toBeLessThan(480);

  const second = await start();
  try {
    const stored = async () => {
      const { body } = await second.agent.get(`${path}/ensembles/0/0/replicates`).expect(200);
      return (body as { replicates: ReplicateRecord[] }).replicates;
    };
    const kept = await stored();
    expect(kept.slice(0, acknowledged.length)).toEqual(acknowledged.map((n) => replicateOf(n)));
    // A piece is stored whole or not at all, and may be sent again.
    expect(kept.length % 4).toBe(0);
    await send(second.agent, acknowledged.length).expect(200);
    expect((await stored()).map(({ replicate }) => replicate)).toEqual(
      Array.from({ length: Math.max(kept.length, acknowledged.length + 4) }, (_, n) => n),
    );
    const now = (await second.agent.get(path).expect(200)).body as Comparison;
    expect([now.status, now.ensembles[0].maps]).toEqual(['running', { 'chance-2026': 4 }]);
    const whole = await second.agent.get(map.replace(/\?.*/, '')).expect(200);
    expect(Number(whole.headers['content-length'])).toBeGreaterThan(0);
  } finally {
    second.child.kill('SIGTERM');
    await second.ended;
  }
}, 120_000);
