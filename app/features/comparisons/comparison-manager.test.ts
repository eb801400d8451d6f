// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import type { Comparison } from '#contract/comparisons.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { createComparisonManager, isWorking, type ComparisonManagerParts } from './comparison-manager.ts';
import { mayStop } from './may-stop.ts';
import { smallComparison, smallDesk, smallPool, smallServer } from './testing/small-comparison.ts';

type Server = ReturnType<typeof smallServer>;

function managerOf(server: Server, parts: Partial<ComparisonManagerParts> = {}) {
  return createComparisonManager({
    server: server.server,
    createPool: () => smallPool(2),
    createDesk: smallDesk,
    mayStop: (comparison, known) => Promise.resolve(mayStop(comparison, known)),
    wait: () => Promise.resolve(),
    now: () => 0,
    ...parts,
  });
}
const standsStill = (manager: ReturnType<typeof managerOf>) =>
  vi.waitFor(
    () => {
      expect(isWorking(manager.get('comparison')?.phase)).toBe(false);
    },
    { timeout: 20_000 },
  );
const work = (comparison: Comparison, onRecord: (now: Comparison) => void = () => undefined) => ({
  comparison,
  loadLayers: () => Promise.resolve(new Map()),
  onRecord,
});
const digestsOf = (server: Server) =>
  server.records.map((records) => [...records.values()].sort((a, b) => a.replicate - b.replicate));
const bytesOf = async (server: Server) =>
  Object.fromEntries(
    await Promise.all(
      [...server.maps].map(
        async ([name, { bytes }]) => [name, [...new Uint8Array(await bytes.arrayBuffer())].join()] as const,
      ),
    ),
  );

describe('a comparison', () => {
  it('comes to the same records and maps with 1, 2 and 4 workers', async () => {
    const found: unknown[] = [];
    for (const workers of [1, 2, 4]) {
      const server = smallServer(smallComparison(6));
      const manager = managerOf(server, { createPool: () => smallPool(workers) });
      manager.start(work(server.stored()));
      await standsStill(manager);
      expect(manager.get('comparison')).toMatchObject({ phase: 'done', error: undefined });
      expect(server.ended()).toBe('all replicates');
      expect(server.records.map((records) => records.size)).toEqual([6, 6]);
      found.push({ records: digestsOf(server), maps: await bytesOf(server) });
    }
    expect(found[1]).toEqual(found[0]);
    expect(found[2]).toEqual(found[0]);
  });

  it('shares its weather between options and draws its own in each replicate', async () => {
    const server = smallServer(smallComparison(6));
    const manager = managerOf(server);
    manager.start(work(server.stored()));
    await standsStill(manager);
    const [wait, clumps] = digestsOf(server);
    expect(clumps.map((r) => r.droughtIndex)).toEqual(wait.map((r) => r.droughtIndex));
    expect(new Set(wait.map((r) => r.droughtIndex.join())).size).toBeGreaterThan(3);
    expect(new Set([...wait, ...clumps].map((r) => r.digest)).size).toBe(12);
  });

  it('goes on from what is saved, as if it had never stood still', async () => {
    const whole = smallServer(smallComparison(8));
    const straight = managerOf(whole);
    straight.start(work(whole.stored()));
    await standsStill(straight);

    const server = smallServer(smallComparison(8));
    let begun = 0;
    // In the middle of the work, however fast it goes.
    const pauseMidway = () => {
      if (++begun === 8) first.pause('comparison');
    };
    const first = managerOf(server, { createPool: () => smallPool(2, pauseMidway) });
    first.start(work(server.stored()));
    await standsStill(first);
    expect(first.get('comparison')?.phase).toBe('paused');
    expect(server.ended()).toBeUndefined();
    const saved = server.records[0].size + server.records[1].size;
    expect(saved).toBeGreaterThan(0);
    expect(saved).toBeLessThan(16);

    // Another tab, which knows only what the server has.
    const rerun: number[] = [];
    const second = managerOf(server, { createPool: () => smallPool(2, (r) => void rerun.push(r)) });
    second.start(work(server.stored()));
    await standsStill(second);
    expect(second.get('comparison')).toMatchObject({ phase: 'done', again: 0 });
    expect(rerun).toHaveLength(16 - saved);
    expect(digestsOf(server)).toEqual(digestsOf(whole));
    expect(await bytesOf(server)).toEqual(await bytesOf(whole));
  });

  it('asks the server what is saved, whatever the page knows of it', async () => {
    const server = smallServer(smallComparison(8));
    const before = server.stored();
    const heard: Comparison[] = [];
    const begun: number[] = [];
    const manager = managerOf(server, { createPool: () => smallPool(2, (r) => void begun.push(r)) });
    const stop = manager.subscribe(() => {
      if (manager.get('comparison')!.version > 4) manager.pause('comparison');
    });
    const start = () => manager.start({ ...work(before), onRecord: (now) => void heard.push(now) });
    start();
    await standsStill(manager);
    stop();
    const saved = server.records[0].size + server.records[1].size;
    expect(saved).toBeGreaterThan(3);
    expect(heard.map(({ ensembles }) => ensembles[0].done + ensembles[1].done)).toEqual([saved]);
    begun.length = 0;
    start();
    await standsStill(manager);
    expect(manager.get('comparison')).toMatchObject({ phase: 'done', again: 0 });
    expect(begun).toHaveLength(16 - saved);
  });

  it('runs again what is recorded but not in the maps, and stores no record twice', async () => {
    const server = smallServer(smallComparison(4));
    const first = managerOf(server);
    first.start(work(server.stored()));
    await standsStill(first);
    const maps = await bytesOf(server);
    server.states.clear();
    server.maps.clear();
    server.pieces.length = 0;
    const second = managerOf(server);
    second.start(work(server.stored()));
    await standsStill(second);
    expect(second.get('comparison')?.again).toBe(8);
    expect(server.pieces).toEqual([]);
    expect(await bytesOf(server)).toEqual(maps);
  });

  it('stops where the engine comes to another digest than the stored one', async () => {
    const server = smallServer(smallComparison(3));
    const first = managerOf(server);
    first.start(work(server.stored()));
    await standsStill(first);
    server.states.clear();
    const [record] = server.records[0].values();
    server.records[0].set(record.replicate, { ...record, digest: 'f'.repeat(64) });
    const second = managerOf(server);
    second.start(work(server.stored()));
    await standsStill(second);
    expect(second.get('comparison')).toMatchObject({
      phase: 'failed',
      error: expect.stringMatching(/another digest/) as string,
    });
  });

  it('stores the counts of its maps now and then, while the runs go on', async () => {
    const server = smallServer(smallComparison(8));
    let clock = 0;
    let versionThen = 0;
    let release!: () => void;
    const held = new Promise<void>((go) => (release = go));
    const putMapsState: typeof server.server.putMapsState = async (...given) => {
      await held;
      return server.server.putMapsState(...given);
    };
    const manager = managerOf(server, {
      server: { ...server.server, putMapsState },
      // Two minutes have passed once half of the runs are in.
      now: () => clock,
    });
    manager.subscribe(() => {
      const { version, phase } = manager.get('comparison')!;
      if (version > 8) clock = 200_000;
      if (version > 14 && phase === 'running' && versionThen === 0) {
        versionThen = version;
        release();
      }
    });
    manager.start(work(server.stored()));
    await standsStill(manager);
    expect(versionThen).toBe(15);
    expect(manager.get('comparison')?.phase).toBe('done');
    expect(server.states.get(0)?.replicates).toBe(8);
  });

  it('fails where the server refuses the counts for good', async () => {
    const refused = new ProblemError(413, 'too-large', 'Too large.');
    const server = smallServer(smallComparison(8));
    let clock = 0;
    const manager = managerOf(server, {
      server: {
        ...server.server,
        putMapsState: () => Promise.reject(refused),
      },
      now: () => clock,
    });
    manager.subscribe(() => {
      if (manager.get('comparison')!.version > 4) clock = 200_000;
    });
    manager.start(work(server.stored()));
    await standsStill(manager);
    expect(manager.get('comparison')).toMatchObject({ phase: 'failed', error: 'Too large.' });
    expect(server.ended()).toBeUndefined();
  });

  it('waits for a server that is away and loses nothing', async () => {
    const server = smallServer(smallComparison(6));
    let away = 3;
    const troubles = new Set<string>();
    const manager = managerOf({
      ...server,
      server: {
        ...server.server,
        putReplicates: (...sent) => {
          if (away-- > 0) return Promise.reject(ProblemError.unreachable());
          return server.server.putReplicates(...sent);
        },
      },
    });
    manager.subscribe(() => {
      const { trouble } = manager.get('comparison') ?? {};
      if (trouble) troubles.add(trouble);
    });
    manager.start(work(server.stored()));
    await standsStill(manager);
    expect(manager.get('comparison')).toMatchObject({ phase: 'done', trouble: undefined });
    expect([...troubles]).toEqual([expect.stringMatching(/cannot be reached/)]);
    expect(server.records.map((records) => records.size)).toEqual([6, 6]);
  });

  it('stops by hand with what is done, and when enough is known', async () => {
    const server = smallServer(smallComparison(200));
    const manager = managerOf(server);
    manager.start(work(server.stored()));
    await vi.waitFor(() => {
      expect(manager.get('comparison')?.version).toBeGreaterThan(4);
    });
    manager.stop('comparison');
    await standsStill(manager);
    expect(server.ended()).toBe('stopped by hand');
    expect(server.maps.get('1 closing')?.replicates).toBe(server.records[1].size);

    const sure = smallServer(smallComparison(400, { stop: { atLeast: 10, halfWidth: 0.4 } }));
    let clock = 0;
    const stopping = managerOf(sure, { now: () => (clock += 1000) });
    stopping.start(work(sure.stored()));
    await standsStill(stopping);
    expect(sure.ended()).toBe('chances known');
    expect(sure.records[0].size).toBeGreaterThanOrEqual(10);
    expect(sure.records[0].size).toBeLessThan(400);
  });
});
