import { describe, expect, it } from 'vitest';
import type { Site } from '#contract/sites.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { betweenSurveys, lastSurvey, recordCovers, startFitBody, type FitChoices } from './compose-fit.ts';
import { posteriorFigures } from './posterior-figures.ts';
import { fittedRates, fittableRates, priorOf } from './rate-prior.ts';

const site = {
  outlook: {
    surveyYear: 2026,
    years: 20,
    stepsPerYear: 1,
    droughtIndex: Array.from({ length: 20 }, () => -1),
    trend: { shiftPerDecade: -1 },
  },
  droughtRecord: {
    years: [
      { year: 2027, index: -3 },
      { year: 2028, index: 2 },
      { year: 2030, index: 1 },
    ],
  },
} as unknown as Site;
const areas = [{ year: 2030, area: 10, error: 1 }];
const surveys = { resurveys: [], areas, fronts: [] };

describe('the years between surveys', () => {
  it('run from the survey to the last one, under recorded weather where there is any', () => {
    expect(lastSurvey(2026, surveys)).toBe(2030);
    expect(recordCovers(site, 2028)).toBe(true);
    expect(recordCovers(site, 2030)).toBe(false);
    const works = [{ year: 2028 }, { year: 2031 }] as never[];
    const between = betweenSurveys(site, { ...surveys, weather: 'record', works });
    expect(between.site.outlook).toMatchObject({ years: 4, droughtIndex: [-3, 2, -1, 1], trend: null });
    expect(between.works).toEqual([{ year: 2028 }]);
    const listed = betweenSurveys(site, { ...surveys, weather: 'outlook', works });
    expect(listed.site.outlook).toMatchObject({
      droughtIndex: [-1, -1, -1, -1],
      trend: { shiftPerDecade: -1 },
    });
  });
});

describe('what starts a fit', () => {
  it('draws what is believed but not fitted, and sends no replicate', () => {
    const belief = { law: 'uniform', low: 1, high: 2 } as const;
    const choices = {
      ...{
        ...surveys,
        name: 'A fit',
        seed: 's',
        areaError: 0,
        works: [],
        weather: 'outlook',
        budget: 'quick',
      },
      rates: [{ name: 'lateralSpread', belief }],
    } as FitChoices;
    const spec = { seed: 's', replicate: 3, uncertain: {}, reportYears: [] } as unknown as RunSpec;
    const body = startFitBody(choices, spec, { lateralSpread: belief, fillRate: belief }, []);
    expect(body.base).toEqual({ seed: 's', uncertain: { draws: 200, rates: { fillRate: belief } } });
    expect(startFitBody(choices, spec, { lateralSpread: belief }, []).base).toEqual({ seed: 's' });
  });
});

describe('what is believed before', () => {
  const plant = { rates: { ...defaultRates, lateralSpread: 0.6, tolerance: -2 }, beliefs: {} };
  it('is what the plant says, else a wide range about its value, within what the rate may be', () => {
    const known = { law: 'normal', mean: 0.5, standardDeviation: 0.1 } as const;
    expect(priorOf({ ...plant, beliefs: { lateralSpread: known } }, 'lateralSpread')).toEqual(known);
    expect(priorOf(plant, 'lateralSpread')).toEqual({ law: 'uniform', low: 0.2, high: 1.8 });
    const tolerance = priorOf(plant, 'tolerance');
    expect(tolerance).toMatchObject({ law: 'uniform' });
    if (tolerance.law === 'uniform') expect(tolerance.low).toBeLessThan(-2);
    expect(priorOf({ ...plant, rates: { ...plant.rates, carryOver: 0.7 } }, 'carryOver')).toMatchObject({
      high: 1,
    });
    expect(fittableRates(plant)).not.toContain('grazingRate');
    expect(fittedRates(plant, new Map([['fillRate', undefined]]))).toHaveLength(1);
  });
});

describe('what a fit came to', () => {
  const rates = [
    { name: 'lateralSpread', belief: { law: 'uniform', low: 0, high: 2 } },
    { name: 'fillRate', belief: { law: 'uniform', low: 0, high: 1 } },
  ] as const;
  const figures = [{ kind: 'area', year: 2030, observed: 10, error: 0 }] as const;
  const member = (a: number, b: number, weight: number) => ({
    point: [a, b],
    summaries: [a * 20],
    distance: 0,
    weight,
  });

  it('is nothing before a generation is complete', () => {
    expect(
      posteriorFigures({ rates: [...rates], figures: [...figures] }, { population: [] }),
    ).toBeUndefined();
  });

  it('weighs members, in the unit of the rate', () => {
    const population = [member(0.4, 0.8, 0.25), member(0.5, 0.6, 0.5), member(0.6, 0.4, 0.25)];
    const posterior = posteriorFigures({ rates: [...rates], figures: [...figures] }, { population })!;
    const [spread] = posterior.rates;
    expect(spread.before[1]).toBeCloseTo(1, 10);
    expect(spread.after[1]).toBeCloseTo(1, 10);
    expect(spread.posterior.reduce((a, b) => a + b)).toBeCloseTo(1, 10);
    expect(spread.prior.reduce((a, b) => a + b)).toBeCloseTo(1, 10);
    expect(spread.narrowed).toBeLessThan(0.3);
    expect(posterior.correlations[0][1]).toBeCloseTo(-1, 10);
    // 1 / (1/16 + 1/4 + 1/16)
    expect(posterior.effective).toBeCloseTo(8 / 3, 10);
    expect(posterior.figures[0].middle).toBeCloseTo(10, 10);
  });
});
