// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { drawnErrors, drawnWeather, startDrawn } from './drawn-draft.ts';

const listed = [
  { year: 2027, value: -1 },
  { year: 2028, value: 2 },
];

describe('weather that replicates draw', () => {
  it('is none where all take the list', () => {
    expect(drawnWeather(startDrawn(null), listed)).toBeNull();
  });
  it.each([
    { kind: 'series', order: 'from a drawn year', values: listed },
    { kind: 'palmer-type', mean: -0.5, standardDeviation: 1.5 },
    {
      kind: 'renewal',
      returnInterval: { law: 'exponential', mean: 9 },
      sinceLatest: 2,
      depth: -3.5,
      depthSpread: 0.2,
      length: { law: 'fixed', years: 1 },
      between: 0.5,
    },
  ] as const)('keeps what was saved: $kind', (drawn) => {
    expect(drawnWeather(startDrawn(structuredClone(drawn) as never), listed)).toEqual(drawn);
  });
  it('says what is wrong with the blanks of its kind alone', () => {
    const draft = { ...startDrawn(null), returnYears: 'often', standardDeviation: '-1' };
    expect(drawnErrors(draft)).toEqual({});
    expect(drawnErrors({ ...draft, kind: 'renewal' })).toEqual({
      returnYears: 'Found “often”; a number from 0.01 to 10000 is expected',
    });
    expect(drawnWeather({ ...draft, kind: 'palmer-type' }, listed)).toBeUndefined();
    expect(drawnErrors({ ...startDrawn(null), kind: 'renewal', depth: '1' }).depth).toMatch(/no milder/);
  });
});
