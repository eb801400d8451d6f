// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
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

  it('makes shares and their sum, and says why where it cannot', async () => {
    const { worker } = portWorker(cellsFace);
    const client = createCellsClient(() => worker);
    const packed = blobOf(Float32Array.of(50, 100, -1));
    const mapping = { scale: 0.01, noData: -1 };
    expect(await client.shareBytes(packed, limits, mapping)).toEqual(Uint8Array.of(128, 255, 0));
    expect(await client.sumShares(packed, limits, mapping, undefined)).toBe(1.5);
    const capacity = Uint8Array.of(255, 51, 255);
    expect(await client.sumShares(packed, limits, mapping, capacity)).toBeCloseTo(0.7, 12);
    expect(capacity).toHaveLength(3);
    await expect(client.shareBytes(packed, limits, {})).rejects.toMatchObject({ name: 'ShareError' });
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
