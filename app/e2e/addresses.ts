import type { Page } from '@playwright/test';
import { listBriefs } from '#contract/briefs.ts';
import { listComparisons } from '#contract/comparisons.ts';
import { fillPath } from '#contract/endpoint.ts';
import { getSession } from '#contract/people.ts';
import { listRuns } from '#contract/runs.ts';
import { listSites } from '#contract/sites.ts';

/** Team, demo site, one of its finished runs, its finished comparison and a brief, as the signed-in person sees them. */
export async function demoAddresses(page: Page) {
  const ask = async (path: string): Promise<unknown> => (await page.request.get(path)).json();
  const session = getSession.reply.parse(await ask(getSession.path));
  const teamId = session.memberships[0].teamId;
  const { sites } = listSites.reply.parse(await ask(fillPath(listSites.path, { teamId })));
  const site = sites.find(({ name }) => name === 'Sallow Reach');
  if (!site) throw new Error('The demo site is missing');
  const { runs } = listRuns.reply.parse(await ask(fillPath(listRuns.path, { siteId: site.id })));
  const run = runs.find(({ status, name }) => status === 'finished' && /mounds/.test(name));
  if (!run) throw new Error('The demo run is missing');
  const { comparisons } = listComparisons.reply.parse(
    await ask(fillPath(listComparisons.path, { siteId: site.id })),
  );
  const comparison = comparisons.find(({ status }) => status === 'finished');
  if (!comparison) throw new Error('The demo comparison is missing');
  const { briefs } = listBriefs.reply.parse(await ask(fillPath(listBriefs.path, { siteId: site.id })));
  if (!briefs[0]) throw new Error('The demo brief is missing');
  return { teamId, siteId: site.id, runId: run.id, comparisonId: comparison.id, briefId: briefs[0].id };
}
