import type { HabitatClass } from '#contract/layers.ts';
import { unchangedOutlook, type Outlook } from '#contract/outlooks.ts';
import type { Plant } from '#contract/plants.ts';
import { demoClasses } from '#rasters/demo/classes.ts';
import { demoSurveyYear } from '#rasters/demo/sallow-reach.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';

/** Everything here is invented. */
export const demoTeamName = 'Northmarsh Restoration Trust';
export const demoSiteName = 'Sallow Reach';

export const demoHabitatClasses: HabitatClass[] = demoClasses.map((row) => ({ ...row }));

export const demoPlant: Plant = {
  name: 'Salt-marsh grass (invented rates)',
  rates: {
    ...defaultRates,
    lateralSpread: 1.2,
    fillRate: 1.2,
    carryOver: 0.8,
    droughtLoss: 2.5,
    tolerance: -1,
    neighbourShift: 1.6,
    refugeShift: 2.2,
    refugeGrowth: 2,
  },
  beliefs: {
    lateralSpread: { law: 'triangular', low: 0.8, mode: 1.2, high: 1.8 },
    fillRate: { law: 'log-normal', median: 1.2, factor: 1.3 },
    tolerance: { law: 'normal', mean: -1, standardDeviation: 0.3 },
  },
  sources: {
    lateralSpread: {
      sure: 'measured here',
      source: 'Invented: three edges, staked and measured again after a year',
      range: { low: 0.8, high: 1.8 },
    },
    fillRate: { sure: 'published for a relative', source: 'Invented: a paper that does not exist' },
    tolerance: { sure: 'expert guess', source: 'Invented: what stood after the latest drought' },
  },
  fieldNumbers: { frontSpeed: { value: 1.1, plusMinus: 0.3 } },
};

const droughtIndex = [
  0.1, 0.7, -1.2, 0.6, 1.3, 1.4, -0.4, 0.2, 0.5, -0.9, 1.8, 0.4, 1.1, -0.2, 0.7, -1.4, 0.3, 1.0, -0.6, 0.9,
  0.8, -0.3, -3.0, -2.9, 1.2, 0.8, 0.7, -0.5, 0.1, 1.6, -1.1, 1.2, 0.4, -0.7,
];

/** 34 years that are mild but for 2049 and 2050, which kill what nothing shelters. */
export const demoOutlook: Outlook = {
  ...unchangedOutlook,
  surveyYear: demoSurveyYear,
  years: droughtIndex.length,
  stepsPerYear: 1,
  boundary: 'mirror',
  droughtIndex,
  drawn: {
    kind: 'renewal',
    returnInterval: { law: 'exponential', mean: 14 },
    sinceLatest: 2,
    depth: -2.8,
    depthSpread: 0.3,
    length: { law: 'fixed', years: 2 },
    between: 0,
  },
};

/** Invented: what works cost, such that the mounds take most of the budget. */
export const demoCosts: UnitCosts = {
  currency: 'EUR',
  mound: 260,
  clump: 3,
  fenceMetre: 12,
  visit: 450,
  visitsPerYear: 3,
  perYear: 150,
  discountRate: 0,
  budget: 25_000,
};

/** What the finished comparison of the options asks. */
export const demoComparison = {
  name: 'Wait, mounds or clumps',
  /** of all ground that can hold the plant: by the horizon some futures come that far, and some do not */
  target: 0.75,
  /** by how much the index lies lower in the drier outlook */
  drier: 0.5,
  /** closer where growth still differs between options */
  mapYears: [2026, 2029, 2032, 2036, 2040, 2045, 2050, 2055, 2060],
  replicates: 24,
} as const;
