import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { StoredRecord } from '#contract/drought-records.ts';
import type { Problem } from '#contract/problem.ts';
import type { Run } from '#contract/runs.ts';
import type { Site } from '#contract/sites.ts';
import { optionsOf, startTestComparison } from '#server/testing/comparisons.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { specFor } from '#server/testing/runs.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Looking ahead');
});
afterAll(() => server.close());

const newSite = () => makeSite(team.agents.modeller, team.teamId);
const send = async (method: 'post' | 'put' | 'delete', path: string, body: object = {}, status = 200) =>
  (await team.agents.modeller[method](path).send(body).expect(status)).body as Site & Problem;

describe('outlooks of a site', () => {
  it('are kept beside the main one, on its span, and one of them can take its place', async () => {
    const site = await newSite();
    const path = `/api/sites/${site.id}/outlooks`;
    const drier = { ...site.outlook, name: 'Drier', trend: { shiftPerDecade: -0.3 }, grazing: false };
    const two = await send('post', path, drier);
    expect(two.otherOutlooks).toMatchObject([
      { name: 'Drier', trend: { shiftPerDecade: -0.3 }, grazing: false },
    ]);
    const [{ id }] = two.otherOutlooks;
    const swapped = await send('post', `${path}/${id}/main`);
    expect(swapped.outlook).toMatchObject({ name: 'Drier', grazing: false });
    expect(swapped.outlook).not.toHaveProperty('id');
    expect(swapped.otherOutlooks).toMatchObject([{ id, name: 'The outlook' }]);
    const gone = await send('delete', `${path}/${id}`);
    expect(gone.otherOutlooks).toEqual([]);
    expect((await team.agents.modeller.delete(`${path}/${id}`)).status).toBe(404);
  });

  it('share survey, horizon and steps: changing them in one changes all, each with its own values', async () => {
    const site = await newSite();
    const path = `/api/sites/${site.id}/outlooks`;
    const droughtIndex = site.outlook.droughtIndex.map((_, i) => -i / 100);
    const { otherOutlooks } = await send('post', path, { ...site.outlook, name: 'Listed', droughtIndex });
    const { surveyYear } = site.outlook;
    const shorter = { ...site.outlook, surveyYear: surveyYear + 1, years: 2, droughtIndex: [1, 1] };
    const moved = await send('put', `/api/sites/${site.id}/outlook`, shorter);
    expect(moved.otherOutlooks[0]).toMatchObject({ years: 2, droughtIndex: [-0.01, -0.02] });
    const back = await send('put', `${path}/${otherOutlooks[0].id}`, {
      ...shorter,
      name: 'Listed',
      years: 1,
      droughtIndex: [5],
    });
    expect(back.outlook).toMatchObject({ years: 1, droughtIndex: [1] });
    expect(back.otherOutlooks[0].droughtIndex).toEqual([5]);
  });

  it('have names of their own, and are no more than twelve', async () => {
    const site = await newSite();
    const path = `/api/sites/${site.id}/outlooks`;
    const refused = await send('post', path, site.outlook, 400);
    expect(refused.fields?.[0]).toMatchObject({
      field: 'name',
      message: expect.stringContaining('already') as string,
    });
    for (let i = 0; i < 11; i++) await send('post', path, { ...site.outlook, name: `Further ${i}` });
    await send('post', path, { ...site.outlook, name: 'One too many' }, 409);
  });

  it('of another site are not there', async () => {
    const [one, other] = [await newSite(), await newSite()];
    const { otherOutlooks } = await send('post', `/api/sites/${one.id}/outlooks`, {
      ...one.outlook,
      name: 'Mine',
    });
    await send('post', `/api/sites/${other.id}/outlooks/${otherOutlooks[0].id}/main`, {}, 404);
    await send('put', `/api/sites/${other.id}/outlooks/${otherOutlooks[0].id}`, one.outlook, 404);
  });
});

describe('the drought record', () => {
  const record = (values: object[], more: object = {}) => ({
    record: { name: 'Station', source: 'invented', kind: 'standardised', factor: 2, values, ...more },
    fileName: 'station.csv',
  });
  const years = (count: number) =>
    Array.from({ length: count }, (_, i) => ({ year: 1990 + i, value: i % 5 === 4 ? -2 : 0.5 }));

  it('is kept as uploaded, shown by year on the Palmer scale, and replaced without being lost', async () => {
    const site = await newSite();
    const path = `/api/sites/${site.id}/drought-records`;
    const first = await send('post', path, record(years(3)));
    expect(first.droughtRecord).toMatchObject({
      ...{ name: 'Station', kind: 'standardised', factor: 2, fileName: 'station.csv' },
      ...{ uploadedBy: 'Looking ahead: modeller', season: { from: 1, to: 12 }, replacedAt: null, gaps: [] },
      years: [1990, 1991, 1992].map((year) => ({ year, index: 1 })),
    });
    const second = await send('post', path, record([{ year: 2000, value: -1 }]));
    expect(second.droughtRecord?.years).toEqual([{ year: 2000, index: -2 }]);
    const { body } = await team.agents.trainer.get(path).expect(200);
    const { records } = body as { records: StoredRecord[] };
    expect(records.map(({ values, replacedAt }) => [values.length, replacedAt === null])).toEqual([
      [1, true],
      [3, false],
    ]);
    const forgotten = await send('delete', `${path}/${records[0].id}`);
    expect(forgotten.droughtRecord).toBeNull();
  });

  it('refuses a date that stands twice, mixed dates and an empty season, at the value', async () => {
    const site = await newSite();
    const path = `/api/sites/${site.id}/drought-records`;
    const fieldOf = async (body: object) => (await send('post', path, body, 400)).fields?.[0].field;
    expect(await fieldOf(record([...years(2), { year: 1990, value: 1 }]))).toBe('record.values.2');
    expect(await fieldOf(record([...years(2), { year: 1999, month: 2, value: 1 }]))).toBe('record.values.2');
    expect(await fieldOf(record([{ year: 1990, month: 2, value: 1 }]))).toBe('record.values');
    expect(await fieldOf(record([]))).toBe('record.values');
  });

  it('of another site cannot be forgotten', async () => {
    const [one, other] = [await newSite(), await newSite()];
    const { droughtRecord } = await send('post', `/api/sites/${one.id}/drought-records`, record(years(3)));
    await send('delete', `/api/sites/${other.id}/drought-records/${droughtRecord!.id}`, {}, 404);
  });

  it('is what runs and comparisons are cautioned by when they start, and their cautions stay', async () => {
    const site = await newSite();
    const spec = specFor(site);
    const [wait] = await optionsOf(team.agents.manager, site.id);
    const run = async () =>
      (
        await team.agents.manager
          .post(`/api/sites/${site.id}/runs`)
          .send({ name: 'Run', optionId: wait.id, spec })
          .expect(200)
      ).body as Run;
    const before = await run();
    expect(before.cautions.map(({ code }) => code)).toContain('no-drought-record');
    await send('post', `/api/sites/${site.id}/drought-records`, record(years(3)));
    const after = await run();
    expect(after.cautions.map(({ code }) => code)).toContain('horizon-beyond-record');
    const kept = await team.agents.trainer.get(`/api/runs/${before.id}`).expect(200);
    expect((kept.body as Run).cautions).toEqual(before.cautions);
    const comparison = await startTestComparison(team.agents.manager, site, {
      outlooks: [
        { name: 'As recorded', droughtIndex: 0 },
        { name: 'Drier', droughtIndex: 0, trend: { shiftPerDecade: -1 } },
      ],
    });
    expect(comparison.cautions.map(({ code, outlooks }) => [code, outlooks])).toEqual(
      expect.arrayContaining([
        ['horizon-beyond-record', []],
        ['trend-assumed', ['Drier']],
      ]),
    );
  });
});
