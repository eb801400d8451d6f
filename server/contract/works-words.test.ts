import { expect, it } from 'vitest';
import type { Action, Clumps } from '#sim-core/spec/run-spec.ts';
import { placeOf, worksByYear, worksInWords, workInWords } from './works-words.ts';

const clumps: Clumps = {
  kind: 'clumps',
  year: 2027,
  points: [
    [10, 20],
    [14, 20],
    [12, 26],
  ],
  each: 40,
};
const loss: Action = {
  kind: 'loss',
  year: 2028,
  area: { shape: 'disc', x: 1, y: 2, radius: 3 },
  share: 0.5,
};

it('clumps are counted one by one, other works as one each', () => {
  expect(workInWords(clumps)).toBe('120 clumps at 3 points');
  expect(workInWords({ ...clumps, points: [[0, 0]], each: 1 })).toBe('1 clump at 1 point');
  expect(worksInWords([clumps, { ...clumps, year: 2029 }, loss])).toBe(
    '240 clumps in 2027 and 2029; 1 one-off loss in 2028',
  );
  expect(worksByYear([loss, clumps, clumps])).toEqual([
    { year: 2027, kind: 'clumps', count: 240 },
    { year: 2028, kind: 'loss', count: 1 },
  ]);
});

it('clumps stand at the middle of their points', () => {
  expect(placeOf(clumps)).toEqual({ x: 12, y: 22 });
  expect(placeOf(loss)).toMatchObject({ x: 1, y: 2 });
});
