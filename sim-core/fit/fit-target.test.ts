import { expect, test } from 'vitest';
import { runReplicate } from '#sim-core/ensemble/replicate.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { figuresOfRun, fitTarget, observedFigures, yearsOfTarget } from './fit-target.ts';
import { resurveyOf } from './resurvey.ts';

const cells = { width: 6, height: 3, cellSize: 2 };
const capacity = new Uint8Array(18).fill(255);
const columns = (upTo: number) => Float32Array.from({ length: 18 }, (_, i) => (i % 6 < upTo ? 1 : 0));
const map = (year: number, cover: Float32Array, areaError = 0) => ({
  ...resurveyOf(year, cover, capacity, cells),
  areaError,
});
const target = fitTarget(columns(2), capacity, cells, {
  maps: [map(2030, columns(4), 3)],
  areas: [{ year: 2028, area: 30, error: 2 }],
  fronts: [{ from: 2026, until: 2030, speed: 0.9, error: 0.1 }],
});

test('a run that is the survey has its figures, and covers of the years asked for alone are needed', () => {
  // 12 cells of 4 m²; 3 sides of 2 m; columns 0 and 1 stood, 2 is one cell off and 3 two: (0 + 0 + 2 + 4) m / 4.
  expect(observedFigures(target)).toEqual([
    { kind: 'map area', year: 2030, observed: 48, error: 3 },
    { kind: 'map edge', year: 2030, observed: 6, error: 0 },
    { kind: 'map reach', year: 2030, observed: 1.5, error: 0 },
    { kind: 'area', year: 2028, observed: 30, error: 2 },
    { kind: 'front', year: 2030, observed: 0.9, error: 0.1 },
  ]);
  expect(yearsOfTarget(target)).toEqual([2026, 2028, 2030]);
  const covers = new Map([
    [2026, columns(2)],
    [2028, columns(3)],
    [2030, columns(4)],
  ]);
  // From column 2 to column 4 in four years: 4 m, 1 m/yr.
  expect(figuresOfRun(target, (year) => covers.get(year)!, capacity)).toEqual([48, 6, 1.5, 36, 1]);
});

test('where the map says nothing, the run counts nothing', () => {
  const known = columns(4);
  known[3] = NaN;
  const partly = fitTarget(columns(2), capacity, cells, { maps: [map(2030, known)], areas: [], fronts: [] });
  const [area] = figuresOfRun(partly, () => columns(4), capacity);
  expect(area).toBe(44);
  expect(observedFigures(partly)[0].observed).toBe(44);
});

test('fronts that retreat count below 0, and a run without an edge has none', () => {
  const only = fitTarget(columns(4), capacity, cells, {
    maps: [],
    areas: [],
    fronts: [{ from: 2026, until: 2028, speed: 0, error: 0 }],
  });
  const speed = (until: Float32Array) =>
    figuresOfRun(only, (year) => (year === 2026 ? columns(4) : until), capacity)[0];
  expect(speed(columns(3))).toBe(-1);
  expect(speed(columns(0))).toBe(0);
});

test('a run compares itself where it stands and keeps no cover for that', () => {
  const grid = gridOf(6, 3, 2);
  const ground = groundOf(18, { cover: columns(2) });
  const spec = specOf({ surveyYear: 2026, years: 4 });
  const { figures, covers } = runReplicate(
    { spec, grid, ground },
    { closing: false, fit: { target, want: 'figures' } },
  );
  const kept = runReplicate({ spec, grid, ground }, { closing: false, coverYears: [2026, 2028, 2030] });
  expect(figures).toEqual(figuresOfRun(target, (year) => kept.covers.get(year)!, ground.capacity));
  expect(covers.size).toBe(0);
});
