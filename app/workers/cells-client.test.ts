// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { layerSourcesSchema } from '#sim-core/spec/run-spec.ts';
import { cellsFace } from './cells-face.ts';
import { CellsWorkerDied, createCellsClient } from './cells-client.ts';
import { portWorker } from './testing/port-worker.ts';

const limits = { cells: 100 };
const blobOf = (values: Int16Array | Float32Array) =>
  new Blob([new Uint8Array(encodeCellValues({ width: values.length, height: 1, values }))]);
const packedYears = () => blobOf(Int16Array.of(2030, -32_768));

describe('createCellsClient', () => {
  it('unpacks what it is handed, and says why where it cannot', async () => {
    const { worker } = portWorker(cellsFace);
    const client = createCellsClient(() => worker);
    const { width, height, values } = await client.unpack(packedYears(), limits);
    expect([width, height, values]).toEqual([2, 1, Int16Array.of(2030, -32_768)]);
    await expect(client.unpack(packedYears(), { cells: 1 })).rejects.toMatchObject({
      name: 'CellValuesError',
      message: expect.stringContaining('at most 1') as string,
    });
    worker.terminate();
  });

  it('makes ground from layers, and says why where it cannot', async () => {
    const { worker } = portWorker(cellsFace);
    const client = createCellsClient(() => worker);
    const grid = { width: 3, height: 1, cellSize: 1, originX: 0, originY: 0, epsg: 32631 };
    const hash = 'a'.repeat(64);
    const layers = new Map([[hash, { packed: blobOf(Float32Array.of(50, 100, -1)), noData: -1 }]]);
    const cover = { layer: hash, scale: 0.01 };
    expect(await client.sourceBytes(layers, cover, grid)).toEqual(Uint8Array.of(128, 255, 0));
    const sources = layerSourcesSchema.parse({ capacity: 0.8, cover });
    const ground = await client.engineGround(layers, sources, grid);
    expect(ground.cover).toEqual(Uint8Array.of(128, 204, 0));
    expect(ground.facts.covered).toBeCloseTo(1.3, 6);
    await expect(client.sourceBytes(layers, { layer: hash }, grid)).rejects.toMatchObject({
      name: 'ShareError',
    });
    worker.terminate();
  });

  it('leaves ground that nobody waits for any more, and gives the next draft a picture all the same', async () => {
    const { worker } = portWorker(cellsFace);
    const client = createCellsClient(() => worker);
    const grid = { width: 3, height: 1, cellSize: 1, originX: 0, originY: 0, epsg: 32631 };
    const hash = 'b'.repeat(64);
    const layers = new Map([[hash, { packed: blobOf(Float32Array.of(50, 100, -1)), noData: -1 }]]);
    const sources = layerSourcesSchema.parse({ cover: { layer: hash, scale: 0.01 } });
    const told: number[] = [];
    const onProgress = (share: number) => void told.push(share);
    const left = new AbortController();
    left.abort();
    await expect(
      client.engineGround(layers, sources, grid, { onProgress, signal: left.signal }),
    ).rejects.toMatchObject({ name: 'GroundLeft' });
    expect(told).toEqual([]);
    expect(await client.coarseGround(layers, sources, grid, ['cover'])).toEqual({
      cover: Uint8Array.of(128, 255, 0),
    });
    await client.engineGround(layers, sources, grid, { onProgress });
    expect(told[0]).toBe(0);
    worker.terminate();
  });

  it('fails what waits when its worker dies, and starts another for the next', async () => {
    const dead = portWorker({ unpack: () => new Promise(() => undefined) });
    const alive = portWorker(cellsFace);
    const create = vi.fn().mockReturnValueOnce(dead.worker).mockReturnValueOnce(alive.worker);
    const client = createCellsClient(create);
    const waiting = client.unpack(packedYears(), limits);
    dead.emit(Object.assign(new Event('error'), { message: 'out of memory' }));
    await expect(waiting).rejects.toThrow(CellsWorkerDied);
    await expect(waiting).rejects.toThrow('out of memory');
    expect(dead.terminate).toHaveBeenCalledOnce();
    expect((await client.unpack(packedYears(), limits)).width).toBe(2);
    expect(create).toHaveBeenCalledTimes(2);
    alive.worker.terminate();
  });
});
