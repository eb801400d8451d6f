// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { labelledYears, labelsThatFit, yearlineScale } from './yearline-scale.ts';

const scale = (width: number, indices: number[] = []) =>
  yearlineScale({ width, surveyYear: 2026, lastYear: 2060, indices, highestShare: 0.9 });

describe('yearlineScale', () => {
  it.each([390, 1440])('finds each year back from where it is drawn, at %i px', (width) => {
    const s = scale(width);
    for (let year = 2026; year <= 2060; year++) {
      expect(s.yearAt(s.x(year))).toBe(year);
      expect(s.yearAt(s.x(year) + 0.49 * s.yearWidth)).toBe(year);
    }
    expect(s.yearAt(-1000)).toBe(2026);
    expect(s.yearAt(width + 1000)).toBe(2060);
  });
  it('keeps the bars of a short future out of the margin', () => {
    const s = yearlineScale({ width: 1440, surveyYear: 2026, lastYear: 2029, indices: [], highestShare: 1 });
    expect(s.yearWidth).toBeGreaterThan(300);
    expect(s.barWidth * 0.26).toBeLessThan(12);
  });
  it('hangs drought further down the drier it is, and never past the room for it', () => {
    const s = scale(1440, [-6, 2]);
    expect(s.length(-1)).toBeLessThan(s.length(-2));
    expect(s.length(-3)).toBeCloseTo(s.hang / 2);
    expect(s.length(-6)).toBeCloseTo(s.hang);
    expect(scale(1440).length(-4)).toBeCloseTo(s.hang);
  });
  it('hangs nothing where there is no drought: at 0 and above', () => {
    for (const index of [0, 0.5, 3, 5]) expect(scale(1440, [-6, 2]).length(index)).toBe(0);
  });
  it('writes indices as far down as the bars reach, and in longer steps where they would touch', () => {
    expect(scale(1440).indexTicks).toEqual([0, -2, -4]);
    expect(scale(390, [-6.4]).indexTicks).toEqual([0, -4]);
    expect(scale(1440, [-6.4]).indexTicks).toEqual([0, -2, -4, -6]);
    expect(scale(1440, [-12]).indexTicks).toEqual([0, -4, -8, -12]);
    for (const driest of [-4, -5, -7.3, -10, -20, -70]) {
      const s = scale(390, [driest]);
      const [, first] = s.indexTicks;
      if (first !== undefined) expect(s.length(first)).toBeGreaterThanOrEqual(11);
      expect(s.length(s.indexTicks[s.indexTicks.length - 1])).toBeLessThanOrEqual(s.hang + 1e-9);
    }
  });
  it('raises cover from the datum to the top', () => {
    const s = scale(1440);
    expect(s.y(0)).toBe(s.datum);
    expect(s.y(1)).toBe(s.top);
  });
});

describe('labelledYears', () => {
  it('labels round years that leave room', () => {
    expect(labelledYears(2026, 2036, 50, 46)).toEqual(range(2026, 2036, 1));
    expect(labelledYears(2026, 2060, 33.6, 46)).toEqual([2026, ...range(2030, 2060, 5)]);
    expect(labelledYears(2026, 2060, 10, 46)).toEqual(range(2030, 2060, 5));
    expect(labelledYears(2026, 2060, 12, 46)).toEqual([2026, ...range(2030, 2060, 5)]);
  });
  it('labels a horizon of one year, and of five hundred', () => {
    expect(labelledYears(2026, 2027, 1000, 46)).toEqual([2026, 2027]);
    expect(labelledYears(2026, 2526, 2, 46)).toEqual([2026, ...range(2050, 2500, 50)]);
  });
});

describe('labelsThatFit', () => {
  it('drops what would run into its neighbour or out of the picture', () => {
    const at = (x: number) => ({ x, label: 'ten letter' });
    expect(labelsThatFit([at(60), at(0), at(100), at(180), at(270)], 0, 300).map((l) => l.x)).toEqual([
      0, 100, 180,
    ]);
  });
});

function range(from: number, to: number, step: number) {
  return Array.from({ length: (to - from) / step + 1 }, (_, i) => from + i * step);
}
