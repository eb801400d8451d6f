// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import { constantBytes } from '#sim-core/grid/ground.ts';
import { runSpecSchema, type Action } from '#sim-core/spec/run-spec.ts';
import { startQuickLook, type QuickLookListener } from './quick-look-client.ts';
import { createQuickLookDesk, type Look, type QuickLookStart } from './quick-look-desk.ts';
import { portWorker } from './testing/port-worker.ts';

const side = 20;
const grid = { width: side, height: side, cellSize: 1, originX: 500_000, originY: 4_000_000, epsg: 32617 };
const place = (column: number, row: number): [number, number] => [
  grid.originX + column + 0.5,
  grid.originY - row - 0.5,
];
function start(): QuickLookStart {
  const cells = side * side;
  return {
    spec: runSpecSchema.parse({
      version: 1,
      seed: 'a',
      surveyYear: 2025,
      years: 40,
      rates: {},
      layers: { cover: 0 },
    }),
    grid,
    ground: {
      capacity: constantBytes(cells, 1),
      vigour: constantBytes(cells, 1),
      exposure: constantBytes(cells, 0),
      refuge: constantBytes(cells, 0),
      fence: constantBytes(cells, 0),
      cover: new Float32Array(cells),
    },
    allowed: Uint8Array.from({ length: cells }, (_, i) => (i % side < 10 ? 1 : 0)),
  };
}
const clumps = (column: number, row: number): Action => ({
  kind: 'clumps',
  year: 2026,
  points: [place(column, row)],
  each: 4,
});
const listen = () => ({
  onLook: vi.fn<QuickLookListener['onLook']>(),
  onLines: vi.fn<QuickLookListener['onLines']>(),
  onFailure: vi.fn<(error: unknown) => void>(),
});
const lookOf = (year: number): Look => ({
  years: Int16Array.of(year),
  texels: Uint8Array.of(0),
  summary: { closable: 1, closedBy: [], half: undefined, eighty: undefined, ninety: undefined },
});

describe('startQuickLook', () => {
  it('looks at the ground, then at the works as they come and go', async () => {
    const { worker } = portWorker(createQuickLookDesk());
    const heard = listen();
    const handle = startQuickLook(start(), heard, () => worker);
    await vi.waitFor(() => expect(heard.onLook).toHaveBeenCalledTimes(1));
    const bare = heard.onLook.mock.calls[0][0];
    expect(bare.years).toEqual(new Int16Array(side * side));
    const works = [clumps(5, 5)];
    handle.setWorks(works);
    await vi.waitFor(() => expect(heard.onLook).toHaveBeenCalledTimes(2));
    const [planted, of] = heard.onLook.mock.calls[1];
    expect(of).toBe(works);
    expect(planted.years[5 * side + 5]).toBeGreaterThan(2025);
    expect(planted.summary.closedBy.at(-1)!.area).toBeGreaterThan(0);
    await vi.waitFor(() =>
      expect(heard.onLines.mock.lastCall?.[0].flatMap(({ lines }) => lines).length).toBeGreaterThan(0),
    );
    handle.setWorks([]);
    await vi.waitFor(() => expect(heard.onLook).toHaveBeenCalledTimes(3));
    expect(heard.onLook.mock.calls[2][0]).toEqual(bare);
    handle.close();
  });

  it('looks at the latest works alone where they come faster than it looks', async () => {
    let opened!: (look: Look) => void;
    const open = new Promise<Look>((resolve) => (opened = resolve));
    const changes: { removed: unknown; added: unknown; reply: (look: Look) => void }[] = [];
    const { worker } = portWorker({
      open: () => open,
      lines: () => [],
      change: ({ removed, added }: { removed: unknown; added: unknown }) =>
        new Promise<Look>((reply) => changes.push({ removed, added, reply })),
    });
    const heard = listen();
    const handle = startQuickLook(start(), heard, () => worker);
    const all = [1, 2, 3, 4].map((column) => [clumps(column, 1)]);
    handle.setWorks(all[0]);
    handle.setWorks(all[1]);
    expect(changes).toHaveLength(0);
    opened(lookOf(0));
    await vi.waitFor(() => expect(changes).toHaveLength(1));
    expect(changes[0].added).toEqual([[0, all[1][0]]]);
    handle.setWorks(all[2]);
    handle.setWorks(all[3]);
    changes[0].reply(lookOf(2030));
    await vi.waitFor(() => expect(changes).toHaveLength(2));
    expect([changes[1].removed, changes[1].added]).toEqual([[0], [[1, all[3][0]]]]);
    changes[1].reply(lookOf(2031));
    await vi.waitFor(() => expect(heard.onLook).toHaveBeenCalledTimes(3));
    expect(heard.onLook.mock.calls.map(([{ years }, works]) => [years[0], works])).toEqual([
      [0, []],
      [2030, all[1]],
      [2031, all[3]],
    ]);
    handle.close();
  });

  it('lays patterns on its ground, where works are allowed', async () => {
    const { worker } = portWorker(createQuickLookDesk());
    const handle = startQuickLook(start(), listen(), () => worker);
    const ring = [place(0, 0), place(19, 0), place(19, 19), place(0, 19)];
    const laid = await handle.lay({
      pattern: { kind: 'scattered', amount: { by: 'count', count: 30 } },
      ring,
      seed: 'x',
    });
    expect(laid.points).toHaveLength(30);
    for (const [x] of laid.points) expect(x).toBeLessThan(grid.originX + 10);
    await expect(handle.lay({ pattern: { kind: 'apart', distance: 0 }, ring, seed: 'x' })).rejects.toThrow(
      'expected more than 0',
    );
    handle.close();
  });

  it('tells why nothing comes any more: a refused ground, a dead worker; and nothing after it was closed', async () => {
    const refused = portWorker(createQuickLookDesk());
    const heard = listen();
    const { spec, ...rest } = start();
    const missing = { ...spec, layers: { ...spec.layers, cover: { layer: 'f'.repeat(64) } } };
    startQuickLook({ ...rest, spec: missing, ground: new Map() }, heard, () => refused.worker);
    await vi.waitFor(() => expect(heard.onFailure).toHaveBeenCalledOnce());
    expect(refused.terminate).toHaveBeenCalledOnce();

    const dead = portWorker({ open: () => new Promise(() => undefined) });
    const other = listen();
    startQuickLook(start(), other, () => dead.worker);
    dead.emit(Object.assign(new Event('error'), { message: 'out of memory' }));
    await vi.waitFor(() => expect(other.onFailure).toHaveBeenCalledOnce());
    expect(other.onFailure.mock.calls[0][0]).toMatchObject({
      name: 'QuickLookDied',
      message: expect.stringContaining('out of memory') as string,
    });

    const closed = portWorker(createQuickLookDesk());
    const quiet = listen();
    const handle = startQuickLook(start(), quiet, () => closed.worker);
    handle.close();
    handle.setWorks([clumps(1, 1)]);
    await new Promise((done) => setTimeout(done, 30));
    expect([quiet.onLook.mock.calls.length, quiet.onFailure.mock.calls.length]).toEqual([0, 0]);
    expect(closed.terminate).toHaveBeenCalledOnce();
  });
});
