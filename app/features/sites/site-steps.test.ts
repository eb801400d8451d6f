import { unchangedOutlook } from '#contract/outlooks.ts';
import { describe, expect, it } from 'vitest';
import type { Layer } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { killingYears, missingGround, siteSteps } from './site-steps.ts';

const layer = (part: Layer['part'], classes: Layer['classes'] = null) => ({ part, classes }) as Layer;
const classes = [{ value: 1, name: 'Marsh', colour: '#5b825a', capacity: 1, vigour: 1 }];

const site = (change: Partial<Site> = {}) =>
  ({
    id: 'a',
    grid: { width: 10, height: 10, cellSize: 1, originX: 0, originY: 0, epsg: 32617 },
    layers: [],
    plant: { name: 'Cordgrass', rates: { ...defaultRates, tolerance: -2.3 } },
    plantSet: false,
    outlook: {
      surveyYear: 2026,
      years: 3,
      stepsPerYear: 1,
      boundary: 'mirror',
      droughtIndex: [0, -2.3, -2.4],
      drawn: null,
    },
    outlookSet: false,
    options: 1,
    runs: 0,
    ...change,
  }) as Site;

const step = (
  key: string,
  change: Partial<Site> = {},
  runs: { status: 'running' | 'finished' | 'stopped' }[] = [],
) => siteSteps(site(change), runs).find((s) => s.key === key)!;

describe('siteSteps', () => {
  it('says what the ground still lacks, and fills as it comes', () => {
    expect(step('ground')).toMatchObject({ state: 'no layers yet', share: 0 });
    expect(step('ground', { layers: [layer('cover')] })).toMatchObject({ state: 'habitat is missing' });
    expect(step('ground', { layers: [layer('cover')] }).share).toBeCloseTo(1 / 3);
    expect(step('ground', { layers: [layer('habitat')] })).toMatchObject({ state: 'cover is missing' });
    expect(step('ground', { layers: [layer('habitat'), layer('cover')] })).toMatchObject({
      state: 'habitat needs classes',
    });
    expect(step('ground', { layers: [layer('habitat'), layer('cover')] }).share).toBeCloseTo(2 / 3);
    expect(
      step('ground', { layers: [layer('habitat', classes), layer('cover'), layer('refuge')] }),
    ).toMatchObject({
      state: '3 layers on a 1 m grid',
      share: 1,
    });
  });

  it('does not call starting values set', () => {
    expect(step('plant')).toMatchObject({ state: 'not yet looked at', share: 0 });
    expect(step('plant', { plantSet: true })).toMatchObject({ state: 'set', share: 1 });
    expect(step('outlook')).toMatchObject({ state: 'not yet looked at', share: 0 });
  });

  it('names the year that kills open marsh, or counts them', () => {
    expect(step('outlook', { outlookSet: true })).toMatchObject({ state: '3 years, drought 2029', share: 1 });
    const two = {
      ...unchangedOutlook,
      surveyYear: 2026,
      years: 2,
      stepsPerYear: 1,
      boundary: 'mirror',
      droughtIndex: [-3, -4],
      drawn: null,
    } as const;
    expect(
      step('outlook', { outlookSet: true, outlook: { ...two, droughtIndex: [-3, -4], drawn: null } }).state,
    ).toBe('2 years, 2 of drought');
    expect(
      step('outlook', { outlookSet: true, outlook: { ...two, droughtIndex: [0, 1], drawn: null } }).state,
    ).toBe('2 years, no drought');
    const drawn = { kind: 'palmer-type', standardDeviation: 2 } as const;
    expect(
      step('outlook', { outlookSet: true, outlook: { ...two, droughtIndex: [0, 1], drawn } }).state,
    ).toBe('2 years, weather drawn');
  });

  it('counts options beside Wait, and runs that are under way', () => {
    expect(step('options')).toMatchObject({ state: 'Wait alone', share: 0 });
    expect(step('options', { options: 3 })).toMatchObject({ state: '2 drawn beside Wait', share: 1 });
    expect(step('runs')).toMatchObject({ state: 'none yet', share: 0 });
    expect(step('runs', { runs: 1 }, [{ status: 'stopped' }])).toMatchObject({ state: '1 run', share: 0.5 });
    expect(step('runs', { runs: 3 }, [{ status: 'running' }, { status: 'finished' }])).toMatchObject({
      state: '3 runs, 1 running',
      share: 1,
    });
  });

  it('leads to the pages that there are and to no others', () => {
    const to = siteSteps(site()).map((s) => s.to);
    expect(to).toEqual([
      '/sites/a/ground',
      '/sites/a/plant',
      '/sites/a/outlook',
      '/sites/a/options',
      '/sites/a/runs',
      '/sites/a/compare',
      '/sites/a/brief',
    ]);
    expect(step('brief')).toMatchObject({ state: 'none yet', share: 0, to: '/sites/a/brief' });
    const brief = (...sent: number[]) =>
      siteSteps(
        site(),
        [],
        [],
        sent.map((people) => ({ sent: people })),
      ).find(({ key }) => key === 'brief');
    expect(brief(0)).toMatchObject({ state: 'ready to send', share: 0.5 });
    expect(brief(3)).toMatchObject({ state: 'sent', share: 1 });
    expect(brief(0, 2)).toMatchObject({ state: '1 of 2 sent', share: 1 });
  });

  it('says which comparisons wait for a decision', () => {
    const state = (...decided: boolean[]) =>
      siteSteps(
        site(),
        [],
        decided.map((taken) => ({
          status: 'finished' as const,
          decision: taken
            ? {
                optionId: '1',
                optionName: 'Wait',
                reason: 'r',
                reservations: '',
                decidedAt: '',
                decidedBy: 'm',
              }
            : null,
        })),
      ).find(({ key }) => key === 'compare')?.state;
    expect(state()).toBe('none yet');
    expect(state(false)).toBe('decision still open');
    expect(state(false, false, true)).toBe('2 decisions open');
    expect(state(true)).toBe('decided');
  });
});

describe('missingGround and killingYears', () => {
  it('asks for classes only where there is habitat', () => {
    expect(missingGround([])).toEqual(['habitat', 'cover']);
    expect(missingGround([layer('habitat')])).toEqual(['classes', 'cover']);
    expect(missingGround([layer('habitat', classes), layer('cover')])).toEqual([]);
  });

  it('counts a year only when it is below the tolerance, not at it', () => {
    expect(killingYears({ surveyYear: 2000, droughtIndex: [-2.3, -2.31] }, -2.3)).toEqual([2002]);
  });
});
