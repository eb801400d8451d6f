import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import type { Problem } from '#contract/problem.ts';
import { studyKeys } from '#sim-core/matters/study-run.ts';
import type { Site } from '#contract/sites.ts';
import type { StudyRun } from '#sim-core/spec/study-run.ts';
import { startTestComparison } from '#server/testing/comparisons.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let comparison: Comparison;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Studying team');
  site = await makeSite(team.agents.modeller, team.teamId);
  comparison = await startTestComparison(team.agents.manager, site);
});
afterAll(() => server.close());

const runOf = (lateralSpread: number, changes: Partial<StudyRun> = {}): StudyRun => ({
  replicate: 0,
  rates: { lateralSpread },
  digest: Math.round(lateralSpread * 1000)
    .toString(16)
    .padStart(64, '0'),
  recoveredYear: 2027,
  coveredArea: [1, 2, 3, 4, 5],
  closedShare: [0, 0.1, 0.2, 0.4, 0.5],
  ...changes,
});
const path = (ensemble = '0/0', id = comparison.id) =>
  `/api/sites/${site.id}/comparisons/${id}/ensembles/${ensemble}/study-runs`;
const put = (runs: StudyRun[], status = 200, ensemble?: string) =>
  team.agents.modeller.put(path(ensemble)).send({ runs }).expect(status);
const get = async (query = '', id?: string) =>
  (await team.agents.trainer.get(path('0/0', id) + query).expect(200)).body as {
    runs: { key: string; run: StudyRun }[];
    total: number;
  };

describe('runs of a study', () => {
  it('are kept under the key of what decides them, once, in their order, and go along with a copy', async () => {
    expect((await put([runOf(0.4), runOf(0.5)])).body).toEqual({ done: 2 });
    expect((await put([runOf(0.5), runOf(0.3)])).body).toEqual({ done: 3 });
    const { runs, total } = await get();
    expect(total).toBe(3);
    expect(runs.map(({ run }) => run)).toEqual([runOf(0.4), runOf(0.5), runOf(0.3)]);
    const keyOf = studyKeys(replicateSpec(comparison.plan, 0, 0, 0));
    expect(runs.map(({ key }) => key)).toEqual([0.4, 0.5, 0.3].map((c) => keyOf(0, { lateralSpread: c })));
    expect((await get('?offset=1&limit=1')).runs.map(({ run }) => run)).toEqual([runOf(0.5)]);
    const copy = await team.agents.modeller
      .post(`/api/sites/${site.id}/comparisons/${comparison.id}/copies`)
      .send({ name: 'Copy', replicates: 8 })
      .expect(200);
    expect((await get('', (copy.body as Comparison).id)).total).toBe(3);
  });

  it('are refused at the field that is wrong', async () => {
    const refused = async (run: StudyRun) => {
      const { fields } = (await put([runOf(0.4), run], 400)).body as Problem;
      return fields?.[0];
    };
    expect(await refused(runOf(99))).toEqual({
      field: 'runs.1.rates.lateralSpread',
      message: 'Found 99; Lateral spread must lie between 0.005 and 20',
    });
    expect(await refused(runOf(0.4, { rates: { grazingRate: 0.1 } }))).toMatchObject({
      field: 'runs.1.rates.grazingRate',
    });
    expect(await refused(runOf(0.4, { closedShare: [0] }))).toMatchObject({ field: 'runs.1.closedShare' });
    expect(await refused(runOf(0.4, { recoveredYear: 2029 }))).toMatchObject({
      field: 'runs.1.recoveredYear',
    });
    const other = (await put([runOf(0.4, { digest: 'f'.repeat(64) })], 422)).body as Problem;
    expect(other.code).toBe('digest-mismatch');
    await put([runOf(0.4)], 404, '7/0');
    expect((await get()).total).toBe(3);
  });
});
