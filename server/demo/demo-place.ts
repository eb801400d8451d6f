import type { HabitatClass } from '#contract/layers.ts';
import type { Outlook, Plant } from '#contract/sites.ts';
import { demoClasses } from '#rasters/demo/classes.ts';
import { demoSurveyYear } from '#rasters/demo/sallow-reach.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';

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
};

const droughtIndex = [
  0.1, 0.7, -1.2, 0.6, 1.3, 1.4, -0.4, 0.2, 0.5, -0.9, 1.8, 0.4, 1.1, -0.2, 0.7, -1.4, 0.3, 1.0, -0.6, 0.9,
  0.8, -0.3, -3.0, -2.9, 1.2, 0.8, 0.7, -0.5, 0.1, 1.6, -1.1, 1.2, 0.4, -0.7,
];

/** 34 years that are mild but for 2049 and 2050, which kill what nothing shelters. */
export const demoOutlook: Outlook = {
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
