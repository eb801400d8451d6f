// @vitest-environment node
import { expect, it } from 'vitest';
import { laidWorks, type LaidSetting } from './laid-works.ts';
import { startingPatterns } from './pattern-pen.ts';

const points: [number, number][] = [
  [1.001, 2],
  [3, 4.006],
];
const setting = (tool: LaidSetting['tool'], clumps: number): LaidSetting => ({
  tool,
  pen: startingPatterns[tool],
  pattern: { kind: 'apart', distance: 5 },
  seed: 'once',
  outline: undefined,
  mound: { radius: 1, strength: 1, halo: 0, clumps },
  year: 2027,
});
const ids = () => {
  let n = 0;
  return () => `i${n++}`;
};

it('makes a planted mound of every point, all of one set that says how', () => {
  const { works, set } = laidWorks(points, setting('scattered', 4), ids());
  expect(works.map((work) => work.kind)).toEqual(['mound', 'clumps', 'mound', 'clumps']);
  expect(new Set(works.map((work) => work.set))).toEqual(new Set([set.id]));
  expect(works[0]).toMatchObject({ x: 1, y: 2, year: 2027 });
  expect(works[2]).toMatchObject({ x: 3, y: 4.01 });
  expect(set.laid).toMatchObject({ pattern: 'apart', seed: 'once', parameters: { tool: 'scattered' } });
});

it('makes one planting of all clumps, and nothing of no points', () => {
  const { works } = laidWorks(points, setting('dispersed', 4), ids());
  expect(works).toMatchObject([
    {
      kind: 'clumps',
      each: 1,
      points: [
        [1, 2],
        [3, 4.01],
      ],
    },
  ]);
  expect(laidWorks([], setting('dispersed', 4), ids()).works).toEqual([]);
});
