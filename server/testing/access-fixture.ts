import type { Role } from '#contract/people.ts';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { makePerson, makeTeam, testPassword, type TestPerson } from './people.ts';
import { addResurvey, startTestFit } from './fits.ts';
import { makeTestBrief, startTestComparison } from './comparisons.ts';
import { packed, sendBytes } from './runs.ts';
import { cover, makeSite, sendUpload } from './sites.ts';
import { testServer, type TestServer } from './test-server.ts';
import { makeCallerTokens, makeToken, type TokenCaller } from './tokens.ts';
import { addMember } from '../people/people.repository.ts';

/** A data folder with one of everything that a path can point at, and the cookies of whoever may ask for it. */
export interface AccessFixture {
  folder: string;
  params: Record<string, string | number>;
  /** the session cookie of each caller; nobody has none */
  cookies: Partial<Record<Role | 'outsider' | 'nobody', string>>;
  /** the shown id of each caller's session */
  sessionIds: Partial<Record<Role | 'outsider' | 'nobody', string>>;
  /** an access token of each caller's, to be revoked by its owner */
  tokenIds: Partial<Record<Role | 'outsider' | 'nobody', string>>;
  /** the access token of each caller that comes with one */
  tokens: Record<TokenCaller, string>;
}

const surveyYear = 2026;

/** Signs in and returns the cookie, which stays good on a copy of the data folder. */
async function cookieOf(server: TestServer, { email }: TestPerson): Promise<string> {
  const reply = await server.request.post('/api/session').send({ email, password: testPassword }).expect(200);
  return (reply.headers['set-cookie'] as unknown as string[])[0].split(';')[0];
}

async function currentSessionId(server: TestServer, cookie: string): Promise<string> {
  const reply = await server.request.get('/api/account/sessions').set('Cookie', cookie).expect(200);
  const { sessions } = reply.body as { sessions: { id: string; current: boolean }[] };
  return sessions.find((session) => session.current)!.id;
}

/** A running run with the frame of the survey year and its closing years. */
async function addRun(agent: Awaited<ReturnType<typeof makeTeam>>['agents']['admin'], siteId: string) {
  const site = await makeRunnable(agent, siteId);
  const spec = {
    version: 1,
    seed: 'access',
    surveyYear,
    years: 2,
    rates: {},
    layers: { cover: { layer: site.cover } },
  };
  const started = await agent
    .post(`/api/sites/${siteId}/runs`)
    .send({ name: 'Run', optionId: site.optionId, spec })
    .expect(200);
  const { id } = started.body as { id: string };
  const put = (path: string, values: Uint8Array | Int16Array) =>
    agent
      .put(`/api/runs/${id}/${path}`)
      .set('Content-Type', 'application/octet-stream')
      .send(Buffer.from(encodeCellValues({ width: 6, height: 4, values })))
      .expect(204);
  await put(`frames/${surveyYear}`, new Uint8Array(24));
  await put('closing', new Int16Array(24));
  return id;
}

async function makeRunnable(agent: Parameters<typeof addRun>[0], siteId: string) {
  const site = await agent.get(`/api/sites/${siteId}`).expect(200);
  const { layers } = site.body as { layers: { part: string; hash: string }[] };
  const made = await agent
    .post(`/api/sites/${siteId}/options`)
    .send({ name: 'Mounds', works: [] })
    .expect(200);
  return {
    cover: layers.find((layer) => layer.part === 'cover')!.hash,
    optionId: (made.body as Option).id,
  };
}

/** Makes the fixture through the API, and closes the server on it. */
export async function makeAccessFixture(): Promise<AccessFixture> {
  const server = await testServer();
  const { teamId, people, agents } = await makeTeam(server, 'Own team');
  const other = await makeTeam(server, 'Other team');
  const extra = await makePerson(server, 'Extra');
  const { write, clock } = server.services;
  await write((manager) => addMember(manager, teamId, extra.id, 'trainer', clock()));

  const invited = await agents.admin
    .post(`/api/teams/${teamId}/invites`)
    .send({ email: 'new@people.example', role: 'trainer' })
    .expect(200);
  const outbox = await agents.admin.get(`/api/teams/${teamId}/outbox`).expect(200);
  const site = await makeSite(agents.admin, teamId);
  const runId = await addRun(agents.admin, site.id);
  const options = await agents.admin.get(`/api/sites/${site.id}/options`).expect(200);
  const comparison = await startTestComparison(agents.admin, site);
  const fit = await startTestFit(agents.admin, await addResurvey(agents.admin, site.id, 2026));
  const ensemble = `/api/sites/${site.id}/comparisons/${comparison.id}/ensembles/0/0`;
  const noCells = packed(new Int16Array(24));
  await sendBytes(agents.admin, `${ensemble}/maps/closing?replicates=1`, noCells).expect(204);
  await sendBytes(agents.admin, `${ensemble}/maps-state?replicates=1`, noCells).expect(204);

  const brief = await makeTestBrief(agents.admin, site, comparison);

  const upload = await sendUpload(agents.admin, teamId, cover());
  await server.services.background.idle();

  await agents.admin
    .post(`/api/sites/${site.id}/feature-imports`)
    .field('kind', 'refuge')
    .field('take', 'all')
    .attach('file', Buffer.from('x,y\n412203,5301895\n'), 'mounds.csv')
    .expect(200);
  const outlookPath = `/api/sites/${site.id}/outlooks`;
  await agents.admin
    .post(outlookPath)
    .send({ ...site.outlook, name: 'Drier' })
    .expect(200);
  const record = { name: 'Record', kind: 'palmer', factor: 1, values: [{ year: 2020, value: -1 }] };
  await agents.admin
    .post(`/api/sites/${site.id}/drought-records`)
    .send({ record, fileName: 'record.csv' })
    .expect(200);
  const { features, otherOutlooks, droughtRecord } = (
    await agents.admin.get(`/api/sites/${site.id}`).expect(200)
  ).body as Site;

  const plant = await agents.admin
    .post(`/api/teams/${teamId}/plants`)
    .send({ plant: site.plant })
    .expect(200);

  const callers = { ...people, outsider: other.people.admin };
  const cookies: AccessFixture['cookies'] = {};
  const sessionIds: AccessFixture['sessionIds'] = {};
  const tokenIds: AccessFixture['tokenIds'] = {};
  for (const [caller, person] of Object.entries(callers) as [Role | 'outsider', TestPerson][]) {
    const cookie = await cookieOf(server, person);
    cookies[caller] = cookie;
    sessionIds[caller] = await currentSessionId(server, cookie);
    tokenIds[caller] = (await makeToken(server, person.id)).id;
  }
  // A member of both teams, so that it is the token's limit that hides one of them.
  await write((manager) => addMember(manager, other.teamId, people.admin.id, 'admin', clock()));
  const tokens = await makeCallerTokens(server, people, other.teamId);
  const params = {
    token: 'x'.repeat(43),
    teamId,
    personId: extra.id,
    inviteId: (invited.body as { id: string }).id,
    messageId: (outbox.body as { messages: { id: string }[] }).messages[0].id,
    siteId: site.id,
    plantId: (plant.body as { id: string }).id,
    version: 1,
    layerId: site.layers[0].id,
    hash: site.layers[0].hash,
    uploadId: upload.id,
    featureId: features[0].id,
    importId: features[0].source.importId,
    outlookId: otherOutlooks[0].id,
    recordId: droughtRecord!.id,
    optionId: (options.body as { options: Option[] }).options.find((option) => !option.wait)!.id,
    revision: 1,
    runId,
    year: surveyYear,
    comparisonId: comparison.id,
    fitId: fit.id,
    option: 0,
    outlook: 0,
    map: 'closing',
    briefId: brief.id,
  };
  return { folder: await server.freeze(), params, cookies, sessionIds, tokenIds, tokens };
}
