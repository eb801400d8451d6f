import { describe, expect, test } from 'vitest';
import { createReferenceKernel } from '#sim-core/kernel/reference/reference-kernel.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { gridOf, kernelSetup } from '#sim-core/testing/setups.ts';
import { prepareWorks, wholeClumps } from './works.ts';

const grid = gridOf(6, 1, 2);
const everywhere = {
  shape: 'polygon' as const,
  ring: [
    [grid.originX, grid.originY],
    [grid.originX + 12, grid.originY],
    [grid.originX + 12, grid.originY - 2],
    [grid.originX, grid.originY - 2],
  ] as [number, number][],
};

function carryOut(actions: Action[], mode: 'mean-field' | 'counts', year = 2021, replicate = 0) {
  const setup = kernelSetup({
    width: 6,
    height: 1,
    mode,
    capacity: Uint8Array.of(255, 255, 51, 0, 255, 255),
    refuge: Uint8Array.of(0, 200, 0, 0, 0, 0),
    cover: Float32Array.of(0, 0.5, 0.2, 0, 1, 0.25),
    clumps: Uint32Array.of(0, 8, 3, 0, 16, 4),
  });
  const kernel = createReferenceKernel(setup);
  const works = prepareWorks(actions, grid);
  const { capacity, sites } = setup;
  const map = { kernel, capacity, fence: new Uint8Array(6), sites, clumpsOnFullCell: 16, replicate };
  const lost = works.apply(year, 0, { ...map, luck: { k0: 3, k1: 4 } });
  return { kernel, lost, works };
}

describe('works', () => {
  test('a planting raises cover to its amount, never above capacity, never lowers it', () => {
    const planting: Action = { kind: 'planting', year: 2021, area: everywhere, cover: 0.5 };
    const field = carryOut([planting], 'mean-field').kernel;
    [0.5, 0.5, 0.2, 0, 1, 0.5].forEach((c, i) => expect(field.cover[i]).toBeCloseTo(c, 6));
    const counted = carryOut([planting], 'counts').kernel;
    expect([...counted.clumps!]).toEqual([8, 8, 3, 0, 16, 8]);
    expect(counted.cover[0]).toBe(0.5);
  });

  test('nothing happens in another year', () => {
    const planting: Action = { kind: 'planting', year: 2022, area: everywhere, cover: 0.5 };
    expect(carryOut([planting], 'counts').kernel.clumps![0]).toBe(0);
    expect(carryOut([planting], 'counts', 2022).kernel.clumps![0]).toBe(8);
  });

  test('a loss removes its share, after plantings of the same year, and says how much went', () => {
    const actions: Action[] = [
      { kind: 'loss', year: 2021, area: everywhere, share: 0.25 },
      { kind: 'planting', year: 2021, area: everywhere, cover: 0.5 },
    ];
    const { kernel, lost } = carryOut(actions, 'mean-field');
    [0.375, 0.375, 0.15, 0, 0.75, 0.375].forEach((c, i) => expect(kernel.cover[i]).toBeCloseTo(c, 6));
    expect(lost).toBeCloseTo((0.5 + 0.5 + 0.2 + 1 + 0.5) / 4, 6);
  });

  test('losses take clumps by luck: the share on average, all of them at 1', () => {
    const loss = (share: number): Action => ({ kind: 'loss', year: 2021, area: everywhere, share });
    expect(carryOut([loss(1)], 'counts').kernel.clumps!.every((n) => n === 0)).toBe(true);
    let left = 0;
    let twice = 0;
    const replicates = 2000;
    for (let replicate = 0; replicate < replicates; replicate++) {
      left += carryOut([loss(0.25)], 'counts', 2021, replicate).kernel.clumps![4];
      twice += carryOut([loss(0.5), loss(0.5)], 'counts', 2021, replicate).kernel.clumps![4];
    }
    // Binomial(16, ¾) has standard deviation √3, Binomial(16, ¼) too: 4 standard errors are 0.155.
    expect(Math.abs(left / replicates - 12)).toBeLessThan(0.155);
    expect(Math.abs(twice / replicates - 4)).toBeLessThan(0.155);
  });

  test('a mound raises refuge to its strength and lowers none', () => {
    const mound = (column: number): Action => ({
      kind: 'mound',
      year: 2021,
      x: grid.originX + column * 2,
      y: grid.originY - 1,
      radius: 1,
      strength: 0.6,
      halo: 0,
    });
    const { kernel } = carryOut([mound(0.5), mound(1.5)], 'mean-field');
    expect(Array.from({ length: 6 }, (_, cell) => kernel.refugeAt(cell))).toEqual([153, 200, 0, 0, 0, 0]);
  });

  test('works that reach no cell are named', () => {
    const { problems } = prepareWorks(
      [
        { kind: 'planting', year: 2021, area: everywhere, cover: 0.5 },
        { kind: 'mound', year: 2021, x: 0, y: 0, radius: 3, strength: 1, halo: 0 },
        { kind: 'fence', year: 2021, area: { shape: 'disc', x: 0, y: 0, radius: 5 }, strength: 1 },
      ],
      grid,
    );
    expect(problems.map((p) => p.field)).toEqual(['actions.1', 'actions.2']);
    expect(problems[0].message).toMatch(/mound reaches no cell/);
  });

  test('broken clumps are made whole without making or losing any on average', () => {
    const ground = { capacity: Uint8Array.of(255), sites: kernelSetup({ width: 1, height: 1 }).sites };
    // 0.28 of 16 sites are 4.48 clumps.
    expect(wholeClumps(0.28, 0, ground, 0.51)).toBe(4);
    expect(wholeClumps(0.28, 0, ground, 0.53)).toBe(5);
    expect(wholeClumps(0.25, 0, ground, 0.999)).toBe(4);
    expect(wholeClumps(Math.fround(0.3125), 0, ground, 0.001)).toBe(5);
    expect(wholeClumps(1, 0, ground, 0.999)).toBe(16);
  });
});
