import { rmSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fillPath, type Endpoint } from '#contract/endpoint.ts';
import * as accessTokens from '#contract/access-tokens.ts';
import * as api from '#contract/api.ts';
import * as briefs from '#contract/briefs.ts';
import * as comparisons from '#contract/comparisons.ts';
import * as costs from '#contract/costs.ts';
import * as fits from '#contract/fits.ts';
import * as ground from '#contract/ground.ts';
import * as optionFiles from '#contract/option-files.ts';
import * as options from '#contract/options.ts';
import * as outlooks from '#contract/outlook-endpoints.ts';
import * as plants from '#contract/plants.ts';
import * as people from '#contract/people.ts';
import * as runs from '#contract/runs.ts';
import * as sites from '#contract/sites.ts';
import * as studies from '#contract/studies.ts';
import * as uploads from '#contract/uploads.ts';
import * as workingGrid from '#contract/working-grid.ts';
import { allRoutes } from '#server/routes.ts';
import { makeAccessFixture, type AccessFixture } from '#server/testing/access-fixture.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { tokenCallers, type TokenCaller } from '#server/testing/tokens.ts';

/**
 * Who may use what, written down a second time and by hand: a rule that is loosened in a route fails here. `anyone` needs no
 * account, `signed-in` an account, the rest name the roles that may, in the team that owns the thing.
 */
const everyRole = 'modeller manager trainer admin';
const planners = 'modeller manager admin';
const modellers = 'modeller admin';
const expected: Record<string, string> = {
  'GET /api/health': 'anyone',
  'GET /api/openapi.json': 'anyone',
  'GET /api/docs': 'anyone',
  'GET /api/session': 'anyone',
  'POST /api/session': 'anyone',
  'DELETE /api/session': 'anyone',
  'GET /api/demo-accounts': 'anyone',
  'GET /api/setup/:token': 'anyone',
  'POST /api/setup/:token': 'anyone',
  'GET /api/invites/:token': 'anyone',
  'POST /api/invites/:token': 'anyone',
  'POST /api/password-resets': 'anyone',
  'POST /api/password-resets/:token': 'anyone',

  'GET /api/account/sessions': 'signed-in',
  'DELETE /api/account/sessions/:sessionId': 'signed-in',
  'PATCH /api/account': 'signed-in',
  'POST /api/account/password': 'signed-in',
  'GET /api/account/tokens': 'signed-in',
  'POST /api/account/tokens': 'signed-in',
  'DELETE /api/account/tokens/:tokenId': 'signed-in',
  'GET /api/teams': 'signed-in',
  'POST /api/teams': 'signed-in',

  'GET /api/teams/:teamId/members': everyRole,
  'PATCH /api/teams/:teamId/members/:personId': 'admin',
  'DELETE /api/teams/:teamId/members/:personId': 'admin',
  'DELETE /api/teams/:teamId/members/:personId/sessions': 'admin',
  'GET /api/teams/:teamId/invites': 'admin',
  'POST /api/teams/:teamId/invites': 'admin',
  'DELETE /api/teams/:teamId/invites/:inviteId': 'admin',
  'GET /api/teams/:teamId/outbox': 'admin',
  'GET /api/teams/:teamId/outbox/:messageId': 'admin',
  'GET /api/teams/:teamId/outbox/:messageId/message.eml': 'admin',

  'GET /api/teams/:teamId/uploads': everyRole,
  'POST /api/teams/:teamId/uploads': modellers,
  'GET /api/teams/:teamId/uploads/:uploadId': everyRole,
  'GET /api/teams/:teamId/uploads/:uploadId/thumbnail': everyRole,
  'PUT /api/teams/:teamId/uploads/:uploadId/choices': modellers,
  'POST /api/teams/:teamId/uploads/:uploadId/place': modellers,
  'POST /api/teams/:teamId/uploads/:uploadId/site': modellers,
  'POST /api/teams/:teamId/uploads/:uploadId/cancel': modellers,
  'POST /api/teams/:teamId/uploads/:uploadId/retry': modellers,
  'DELETE /api/teams/:teamId/uploads/:uploadId': modellers,

  'GET /api/teams/:teamId/plants': everyRole,
  'POST /api/teams/:teamId/plants': modellers,
  'PATCH /api/teams/:teamId/plants/:plantId': modellers,
  'POST /api/teams/:teamId/plants/:plantId/copies': modellers,
  'POST /api/teams/:teamId/plants/:plantId/versions': modellers,
  'GET /api/teams/:teamId/plants/:plantId/versions/:version': everyRole,

  'GET /api/teams/:teamId/sites': everyRole,
  'POST /api/teams/:teamId/sites': modellers,
  'GET /api/sites/:siteId': everyRole,
  'PATCH /api/sites/:siteId': modellers,
  'DELETE /api/sites/:siteId': modellers,
  'POST /api/sites/:siteId/layers': modellers,
  'PATCH /api/sites/:siteId/layers/:layerId': modellers,
  'PUT /api/sites/:siteId/layers/:layerId/classes': modellers,
  'DELETE /api/sites/:siteId/layers/:layerId': modellers,
  'GET /api/sites/:siteId/layers/:layerId/dependents': everyRole,
  'POST /api/sites/:siteId/layers/:layerId/put-back': modellers,
  'GET /api/sites/:siteId/cell-sizes': everyRole,
  'GET /api/sites/:siteId/grid-change': everyRole,
  'POST /api/sites/:siteId/grid-change': modellers,
  'DELETE /api/sites/:siteId/grid-change': modellers,
  'GET /api/sites/:siteId/layer-history': everyRole,
  'GET /api/sites/:siteId/layer-values/:hash': everyRole,
  'GET /api/sites/:siteId/layer-files/:hash': everyRole,
  'PUT /api/sites/:siteId/elevation-curves': modellers,
  'POST /api/sites/:siteId/feature-imports': modellers,
  'DELETE /api/sites/:siteId/feature-imports/:importId': modellers,
  'PATCH /api/sites/:siteId/features/:featureId': modellers,
  'DELETE /api/sites/:siteId/features/:featureId': modellers,
  'PUT /api/sites/:siteId/plant': modellers,
  'PUT /api/sites/:siteId/outlook': modellers,
  'POST /api/sites/:siteId/outlooks': modellers,
  'PUT /api/sites/:siteId/outlooks/:outlookId': modellers,
  'DELETE /api/sites/:siteId/outlooks/:outlookId': modellers,
  'POST /api/sites/:siteId/outlooks/:outlookId/main': modellers,
  'GET /api/sites/:siteId/drought-records': everyRole,
  'POST /api/sites/:siteId/drought-records': modellers,
  'DELETE /api/sites/:siteId/drought-records/:recordId': modellers,

  'GET /api/sites/:siteId/options': everyRole,
  'POST /api/sites/:siteId/options': planners,
  'PATCH /api/sites/:siteId/options/:optionId': planners,
  'POST /api/sites/:siteId/options/:optionId/copies': planners,
  'PUT /api/sites/:siteId/option-order': planners,
  'GET /api/sites/:siteId/options/:optionId/history': everyRole,
  'GET /api/sites/:siteId/options/:optionId/history/:revision': everyRole,
  'POST /api/sites/:siteId/options/:optionId/history/:revision/bring-back': planners,
  'GET /api/sites/:siteId/options/:optionId/option.geojson': everyRole,
  'GET /api/sites/:siteId/options/:optionId/points.csv': everyRole,
  'GET /api/sites/:siteId/options/:optionId/crew.gpx': everyRole,
  'GET /api/sites/:siteId/options/:optionId/crew.csv': everyRole,
  'POST /api/sites/:siteId/works-preview': planners,
  'GET /api/sites/:siteId/costs': everyRole,
  'PUT /api/sites/:siteId/costs': planners,
  'DELETE /api/sites/:siteId/options/:optionId': planners,

  'GET /api/sites/:siteId/runs': everyRole,
  'POST /api/sites/:siteId/runs': planners,
  'GET /api/runs/:runId': everyRole,
  'PATCH /api/runs/:runId': planners,
  'DELETE /api/runs/:runId': planners,
  'PUT /api/runs/:runId/frames/:year': planners,
  'GET /api/runs/:runId/frames/:year': everyRole,
  'PUT /api/runs/:runId/closing': planners,
  'GET /api/runs/:runId/closing': everyRole,
  'POST /api/runs/:runId/finish': planners,
  'POST /api/runs/:runId/stop': planners,
  'POST /api/runs/:runId/checks': everyRole,
  'GET /api/runs/:runId/series.csv': everyRole,
  'GET /api/runs/:runId/spec.json': everyRole,
  'GET /api/runs/:runId/files.zip': everyRole,
  'GET /api/runs/:runId/cover/:year': everyRole,
  'GET /api/runs/:runId/closing.tif': everyRole,

  'GET /api/sites/:siteId/comparisons': everyRole,
  'POST /api/sites/:siteId/comparisons': planners,
  'GET /api/sites/:siteId/comparisons/:comparisonId': everyRole,
  'PATCH /api/sites/:siteId/comparisons/:comparisonId': planners,
  'DELETE /api/sites/:siteId/comparisons/:comparisonId': planners,
  'POST /api/sites/:siteId/comparisons/:comparisonId/copies': planners,
  'PUT /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/replicates': planners,
  'GET /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/replicates': everyRole,
  'PUT /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/study-runs': planners,
  'GET /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/study-runs': everyRole,
  'PUT /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/maps/:map': planners,
  'GET /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/maps/:map': everyRole,
  'PUT /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/maps-state': planners,
  'GET /api/sites/:siteId/comparisons/:comparisonId/ensembles/:option/:outlook/maps-state': everyRole,
  'POST /api/sites/:siteId/comparisons/:comparisonId/end': planners,
  'POST /api/sites/:siteId/comparisons/:comparisonId/resume': planners,
  'POST /api/sites/:siteId/comparisons/:comparisonId/decision': 'manager admin',

  'GET /api/sites/:siteId/fits': everyRole,
  'POST /api/sites/:siteId/fits': modellers,
  'GET /api/sites/:siteId/fits/:fitId': everyRole,
  'PUT /api/sites/:siteId/fits/:fitId/state': modellers,
  'POST /api/sites/:siteId/fits/:fitId/stop': modellers,
  'POST /api/sites/:siteId/fits/:fitId/resume': modellers,
  'POST /api/sites/:siteId/fits/:fitId/accept': modellers,
  'DELETE /api/sites/:siteId/fits/:fitId': modellers,

  'GET /api/sites/:siteId/briefs': everyRole,
  'POST /api/sites/:siteId/briefs': planners,
  'GET /api/sites/:siteId/briefs/:briefId': everyRole,
  'DELETE /api/sites/:siteId/briefs/:briefId': planners,
  'POST /api/sites/:siteId/briefs/:briefId/copies': planners,
  'POST /api/sites/:siteId/briefs/:briefId/versions': planners,
  'GET /api/sites/:siteId/briefs/:briefId/versions/:version': everyRole,
  'GET /api/sites/:siteId/briefs/:briefId/versions/:version/brief.pdf': everyRole,
  'GET /api/sites/:siteId/briefs/:briefId/versions/:version/maps/:option': everyRole,
  'GET /api/sites/:siteId/briefs/:briefId/messages': planners,
  'POST /api/sites/:siteId/briefs/:briefId/messages': planners,
};

/** Where no access token may go, whatever its scope: accounts, sessions, passwords, and whatever makes members. */
const closedToTokens = new Set([
  'GET /api/session',
  'POST /api/session',
  'DELETE /api/session',
  'GET /api/demo-accounts',
  'GET /api/setup/:token',
  'POST /api/setup/:token',
  'GET /api/invites/:token',
  'POST /api/invites/:token',
  'POST /api/password-resets',
  'POST /api/password-resets/:token',
  'GET /api/account/sessions',
  'DELETE /api/account/sessions/:sessionId',
  'PATCH /api/account',
  'POST /api/account/password',
  'GET /api/account/tokens',
  'POST /api/account/tokens',
  'DELETE /api/account/tokens/:tokenId',
  'POST /api/teams',
  'GET /api/teams/:teamId/members',
  'PATCH /api/teams/:teamId/members/:personId',
  'DELETE /api/teams/:teamId/members/:personId',
  'DELETE /api/teams/:teamId/members/:personId/sessions',
  'GET /api/teams/:teamId/invites',
  'POST /api/teams/:teamId/invites',
  'DELETE /api/teams/:teamId/invites/:inviteId',
  'GET /api/teams/:teamId/outbox',
  'GET /api/teams/:teamId/outbox/:messageId',
  'GET /api/teams/:teamId/outbox/:messageId/message.eml',
]);

const callers = ['nobody', 'modeller', 'manager', 'trainer', 'admin', 'outsider'] as const;
type Caller = (typeof callers)[number];

/** The status of a refusal, or undefined for whoever is let in. */
function refusal(rule: string, caller: Caller): number | undefined {
  if (rule === 'anyone') return undefined;
  if (caller === 'nobody') return 401;
  if (rule === 'signed-in') return undefined;
  if (caller === 'outsider') return 404;
  return rule.split(' ').includes(caller) ? undefined : 403;
}

/** The same for whoever comes with an access token. */
function tokenRefusal(name: string, caller: TokenCaller): number | undefined {
  if (caller === 'unknown token' || caller === 'expired token' || caller === 'revoked token') return 401;
  if (closedToTokens.has(name)) return 403;
  if (caller === 'read token' && !name.startsWith('GET ')) return 403;
  const rule = expected[name];
  const scoped = rule !== 'anyone' && rule !== 'signed-in';
  if (caller === 'other team’s token') return scoped ? 404 : undefined;
  return refusal(rule, caller === 'trainer’s token' ? 'trainer' : 'admin');
}

const isEndpoint = (value: unknown): value is Endpoint =>
  typeof value === 'object' && value !== null && 'method' in value && 'path' in value && 'reply' in value;
const contract = [
  people,
  accessTokens,
  plants,
  sites,
  outlooks,
  ground,
  workingGrid,
  uploads,
  options,
  optionFiles,
  costs,
  runs,
  comparisons,
  studies,
  api,
  fits,
  briefs,
]
  .flatMap((module) => Object.values<unknown>({ ...module }))
  .filter(isEndpoint);
const nameOf = ({ method, path }: Endpoint) => `${method} ${path}`;

let fixture: AccessFixture;
let shared: TestServer;
beforeAll(async () => {
  fixture = await makeAccessFixture();
  shared = await testServer({}, fixture.folder);
}, 180_000);
afterAll(async () => {
  await shared.close();
  rmSync(fixture.folder, { recursive: true, force: true });
});

const isToken = (caller: Caller | TokenCaller): caller is TokenCaller => caller.endsWith('token');

async function ask(server: TestServer, endpoint: Endpoint, caller: Caller | TokenCaller): Promise<number> {
  const owner = isToken(caller) ? 'admin' : caller;
  const params = {
    ...fixture.params,
    sessionId: fixture.sessionIds[owner] ?? 'none',
    tokenId: fixture.tokenIds[owner] ?? 'none',
  };
  const method = endpoint.method.toLowerCase() as Lowercase<Endpoint['method']>;
  const request = server.request[method](fillPath(endpoint.path, params));
  const reply = isToken(caller)
    ? await request.set('Authorization', `Bearer ${fixture.tokens[caller]}`)
    : await request.set('Cookie', fixture.cookies[caller] ?? '');
  return reply.status;
}

/** Asks on a copy of the fixture, so that what a caller deletes is there for the next one. */
async function askOnCopy(endpoint: Endpoint, caller: Caller | TokenCaller): Promise<number> {
  const server = await testServer({}, fixture.folder);
  const status = await ask(server, endpoint, caller);
  await server.close();
  return status;
}

describe('every route', () => {
  it('is in the contract and in the table above, and every endpoint of the contract is mounted', async () => {
    const server = await testServer();
    const mounted = allRoutes(server.services).map(({ endpoint }) => nameOf(endpoint));
    await server.close();
    expect(mounted.toSorted()).toEqual(Object.keys(expected).sort());
    expect(contract.map(nameOf).sort()).toEqual(Object.keys(expected).sort());
  });

  it.each(contract.map((endpoint) => [nameOf(endpoint), endpoint] as const))(
    '%s lets in whom it should',
    async (name, endpoint) => {
      const rule = expected[name];
      for (const caller of [...callers, ...tokenCallers]) {
        const wanted = isToken(caller) ? tokenRefusal(name, caller) : refusal(rule, caller);
        if (wanted !== undefined)
          expect([caller, await ask(shared, endpoint, caller)]).toEqual([caller, wanted]);
        else {
          const deletes = endpoint.method === 'DELETE';
          const status = deletes ? await askOnCopy(endpoint, caller) : await ask(shared, endpoint, caller);
          // Without a body, 400 is as far as whoever is let in can come; but the thing must be there for them.
          expect([401, 403, 404, 500], `${caller}: ${status}`).not.toContain(status);
        }
      }
    },
  );
});
