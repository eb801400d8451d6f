import { describe, expect, it } from 'vitest';
import { onSpan, outlookSchema, outlookWeather } from './outlooks.ts';

const stored = {
  surveyYear: 2026,
  years: 3,
  stepsPerYear: 1,
  boundary: 'mirror',
  droughtIndex: [-1, -2, -3],
  drawn: null,
};
const outlook = outlookSchema.parse(stored);
const renewal = {
  kind: 'renewal' as const,
  returnInterval: { law: 'exponential' as const, mean: 12 },
  ...{ sinceLatest: 3, depth: -4, length: { law: 'fixed' as const, years: 1 } },
};

describe('an outlook', () => {
  it('that was stored before it could change anything changes nothing', () => {
    expect(outlook).toMatchObject({ name: 'The outlook', trend: null, losses: [], grazing: true });
    expect(outlookWeather(outlook, 'single run')).toEqual({ droughtIndex: [-1, -2, -3] });
    expect(
      outlookWeather({ ...outlook, trend: { shiftPerDecade: 0, frequencyPerDecade: 1 } }, 'ensemble'),
    ).toEqual({
      droughtIndex: [-1, -2, -3],
    });
  });
  it('brings its trend, losses and grazing; more frequent droughts only where weather is drawn from droughts', () => {
    const changed = {
      ...outlook,
      drawn: renewal,
      trend: { shiftPerDecade: -0.3, frequencyPerDecade: 1.2 },
      losses: [{ year: 2027, share: 0.5 }],
      grazing: false,
    };
    const rest = { losses: changed.losses, grazing: false };
    expect(outlookWeather(changed, 'ensemble')).toEqual({
      droughtIndex: renewal,
      trend: changed.trend,
      ...rest,
    });
    expect(outlookWeather(changed, 'single run')).toEqual({
      droughtIndex: [-1, -2, -3],
      trend: { shiftPerDecade: -0.3 },
      ...rest,
    });
  });
  it('keeps losses beyond its horizon back', () => {
    const losses = [
      { year: 2026, share: 0.1 },
      { year: 2029, share: 0.2 },
      { year: 2030, share: 0.3 },
      { chance: 0.1, from: 2030, share: 0.4 },
      { chance: 0.1, until: 2040, share: 0.5 },
    ];
    expect(outlookWeather({ ...outlook, losses }, 'ensemble').losses?.map(({ share }) => share)).toEqual([
      0.2, 0.5,
    ]);
  });
  it('keeps its values at their years on another span', () => {
    const moved = onSpan(outlook, { ...outlook, surveyYear: 2027, years: 4, stepsPerYear: 12 });
    expect(moved).toMatchObject({ surveyYear: 2027, stepsPerYear: 12, droughtIndex: [-2, -3, 0, 0] });
    expect(outlookSchema.safeParse(moved).success).toBe(true);
  });
});
