import { expect, test } from 'vitest';
import { startAbc, type AbcPlan } from './abc.ts';
import { bareInBoth, checkProposals, falseAlarm, fitMap, hit, missed } from './fit-check.ts';
import { checkGeneration, mostInGeneration, ratesAt, runOfProposal } from './fit-run.ts';
import { leaveOneOut } from './leave-one-out.ts';
import { specOf } from '#sim-core/testing/setups.ts';

const plan: AbcPlan = {
  seed: 'check',
  dimensions: 1,
  observed: [10, 20, 5],
  errors: [0, 0, 0],
  population: 4,
  priorRuns: 40,
  mostRuns: 100,
  leastAcceptance: 0.05,
};
const member = (share: number, weight: number) => ({ point: [share], summaries: [], distance: 0, weight });

test('members are checked as often as they weigh, to the nearest run either way', () => {
  const population = [member(0.1, 0.5), member(0.2, 0.3), member(0.3, 0.15), member(0.4, 0.05)];
  const proposals = checkProposals(plan, { ...startAbc(), population }, 20);
  const times = (share: number) => proposals.filter(({ point }) => point[0] === share).length;
  expect([times(0.1), times(0.2), times(0.3), times(0.4)]).toEqual([10, 6, 3, 1]);
  expect(proposals).toEqual(checkProposals(plan, { ...startAbc(), population }, 20));
  expect(checkProposals(plan, startAbc(), 20)).toEqual([]);
});

test('a cell of the map stands where at least half of the runs have it so', () => {
  const survey = Uint8Array.from([1, 1, 0, 0, 255]);
  const stood = Uint8Array.from([2, 1, 2, 1, 4]);
  expect([...fitMap(survey, stood, 4)]).toEqual([hit, missed, falseAlarm, bareInBoth, 255]);
});

test('runs of a fit share all but luck and the fitted rates; those that are not fitted stay', () => {
  const base = specOf({ rates: { lateralSpread: 0.4, tolerance: -2 } });
  const fitted = [{ name: 'lateralSpread', belief: { law: 'uniform', low: 1, high: 3 } }] as const;
  expect(ratesAt(fitted, [0.25])).toEqual({ lateralSpread: 1.5 });
  const spec = runOfProposal(base, fitted, { generation: 2, number: 7, point: [0.25] });
  expect(spec.rates).toEqual({ ...base.rates, lateralSpread: 1.5 });
  expect(spec.replicate).toBe(2 * mostInGeneration + 7);
  // The last number of the last generation still is a replicate.
  expect((checkGeneration + 1) * mostInGeneration - 1).toBeLessThanOrEqual(0xffffff);
});

test('a year left out is foreseen by the runs that fit the others', () => {
  // The second figure is twice the first, the third has nothing to do with either.
  const prior = Array.from({ length: 40 }, (_, i) => ({
    point: [i / 40],
    summaries: [i / 2, i, (i * 7) % 11],
  }));
  const figure = (year: number, observed: number) => ({ kind: 'area', year, observed, error: 0 }) as const;
  const figures = [figure(2030, 10), figure(2032, 20), figure(2032, 5)];
  const [first, second] = leaveOneOut(plan, { prior, scales: [1, 1, 0] }, figures);
  // Without 2030 the four runs nearest to 20: 18.. 22 of the second figure, so about 10 of the first.
  expect(first.figures[0]).toMatchObject({ within: true });
  expect(first.figures[0].low).toBeGreaterThanOrEqual(9);
  expect(first.figures[0].high).toBeLessThanOrEqual(11);
  expect(second.figures[0]).toMatchObject({ within: true });
  const shifted = leaveOneOut(plan, { prior, scales: [1, 1, 0] }, [figure(2030, 3), figures[1], figures[2]]);
  expect(shifted[0].figures[0].within).toBe(false);
  expect(leaveOneOut(plan, { prior, scales: [1] }, [figure(2030, 10)])).toEqual([]);
});
