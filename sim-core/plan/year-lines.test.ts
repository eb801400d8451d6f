import { expect, test } from 'vitest';
import { gridOf } from '#sim-core/testing/setups.ts';
import { lineYears, yearLines } from './year-lines.ts';

const side = 60;
const grid = gridOf(side, side, 2);
const middle = { x: grid.originX + side, y: grid.originY - side };
/** Closes from the middle outwards, half a year a metre. */
const fromMiddle = (cell: number) =>
  Math.hypot((cell % side) + 0.5 - side / 2, Math.floor(cell / side) + 0.5 - side / 2) * 2 * 0.5;

test('lines of equal closing year are where the ground closes in that year', () => {
  const input = { grid, closing: fromMiddle, surveyYear: 2025, horizon: 100, years: [2035, 2045] };
  const [ten, twenty] = yearLines(input);
  for (const [line, radius] of [
    [ten, 20],
    [twenty, 40],
  ] as const) {
    expect(line.lines).toHaveLength(1);
    const [first] = line.lines;
    expect(first[0]).toEqual(first.at(-1));
    for (const [x, y] of first)
      expect(Math.abs(Math.hypot(x - middle.x, y - middle.y) - radius)).toBeLessThan(0.4);
    const { x, y, angle } = line.label!;
    expect(Math.abs(Math.hypot(x - middle.x, y - middle.y) - radius)).toBeLessThan(0.4);
    // It runs across the way to the middle, and is never written upside down.
    const along = Math.abs(Math.cos(angle) * (x - middle.x) + Math.sin(angle) * (y - middle.y)) / radius;
    expect(along).toBeLessThan(0.25);
    expect(Math.abs(angle)).toBeLessThanOrEqual(Math.PI / 2);
  }
});

test('fewer samples give the same lines to a sample or so', () => {
  const [line] = yearLines({
    grid,
    closing: fromMiddle,
    surveyYear: 2025,
    horizon: 100,
    years: [2045],
    side: 20,
  });
  for (const [x, y] of line.lines[0])
    expect(Math.abs(Math.hypot(x - middle.x, y - middle.y) - 40)).toBeLessThan(4);
});

test('no line along the edge of the map, and none of a year in which nothing closes', () => {
  const closing = (cell: number) => (cell % side < 30 ? (cell % side) * 2 : Infinity);
  const [line, none] = yearLines({ grid, closing, surveyYear: 2025, horizon: 80, years: [2045, 2025 + 79] });
  expect(line.lines).toHaveLength(1);
  // Column 10 closes after 20 years: its middle lies 21 m from the edge.
  for (const [x] of line.lines[0]) expect(x - grid.originX).toBeCloseTo(21, 6);
  expect(Math.abs(line.label!.angle)).toBeCloseTo(Math.PI / 2, 6);
  for (const [x] of none.lines.flat()) expect(Math.abs(x - grid.originX - 60)).toBeLessThan(2);
  const nowhere = yearLines({ grid, closing: () => Infinity, surveyYear: 2025, horizon: 80, years: [2045] });
  expect(nowhere).toEqual([{ year: 2045, lines: [], label: undefined }]);
});

test.each<[number, number, number[]]>([
  [2025, 6, [2026, 2027, 2028, 2029, 2030, 2031]],
  [2025, 40, [2030, 2035, 2040, 2045, 2050, 2055, 2060, 2065]],
  [2026, 60, [2030, 2040, 2050, 2060, 2070, 2080]],
])('round years after %i for %i years', (surveyYear, years, expected) => {
  expect(lineYears(surveyYear, years)).toEqual(expected);
});
