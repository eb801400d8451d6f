import { getSite } from '#contract/sites.ts';
import { fillPath } from '#contract/endpoint.ts';
import { demoAddresses } from './addresses.ts';
import { inventedSite } from './invented-site.ts';
import { laterSurveys } from './later-surveys.ts';
import { demoPeople } from './people.ts';
import { expect, signIn, test } from './test.ts';

test('a modeller fits two rates to two resurveys, goes on after a reload, looks at the maps and takes the rates over; a comparison says whether the site is on track', async ({
  page,
}) => {
  await signIn(page, demoPeople.modeller);
  const { teamId } = await demoAddresses(page);
  const { siteId, site, cover } = await inventedSite(page.request, teamId, {
    name: 'Fitted Marsh',
    side: 40,
    years: 10,
    cover: (column) => (column < 10 ? 0.8 : 0),
    // What is compared later needs an option beside Wait.
    options: [
      {
        name: 'Clumps',
        works: ({ originX, originY }) => [
          { kind: 'clumps', year: 2027, points: [[originX + 30, originY - 20]], each: 6 },
        ],
      },
    ],
  });
  const truth = { lateralSpread: 1, fillRate: 1.4 };
  await laterSurveys(page.request, site, cover, [2029, 2032], truth);

  await page.goto(`/sites/${siteId}/plant`);
  await page.getByRole('link', { name: 'Fit to a resurvey' }).click();
  await expect(page.getByLabel('2029')).toBeChecked();
  await page.getByLabel('Highest lateral spread').fill('3');
  await page.getByLabel('How much the fit takes').selectOption('quick');
  await page.getByRole('button', { name: 'Start the fit' }).click();

  // The tab is loaded anew in the middle; it goes on by itself.
  await expect(page.getByRole('progressbar')).toHaveAccessibleName(/run \d+ of the first 200/);
  page.once('dialog', (dialog) => void dialog.accept());
  await page.reload();
  await expect(page.getByRole('heading', { name: 'Into the plant' })).toBeVisible({ timeout: 120_000 });
  await expect(page.getByText(/finished: \d generations?/)).toBeVisible({ timeout: 120_000 });
  await expect(page.getByRole('heading', { name: 'Leaving one year out' })).toBeVisible();

  await page.getByRole('button', { name: 'Compare map by map' }).click();
  await expect(page.getByRole('row', { name: /^κ \d/ })).toBeVisible({ timeout: 60_000 });
  await expect(page.getByRole('row', { name: /^Hits \d/ })).toContainText('m²');

  await page.getByRole('button', { name: 'Take these rates over' }).click();
  await expect(page.getByText(/Taken over by .*plant of the site/)).toBeVisible();
  const reply = await page.request.get(fillPath(getSite.path, { siteId }));
  const { plant } = getSite.reply.parse(await reply.json());
  const law = plant.beliefs.lateralSpread;
  if (law?.law !== 'values') throw new Error('Expected a law of values');
  const sorted = law.values.toSorted((a, b) => a - b);
  expect(sorted[5]).toBeLessThan(truth.lateralSpread);
  expect(sorted[94]).toBeGreaterThan(truth.lateralSpread);
  // The belief before reached from 0.53 to 3.
  expect(sorted[94] - sorted[5]).toBeLessThan(1.4);

  // The same resurveys against the futures of a comparison.
  await page.goto(`/sites/${siteId}/compare`);
  await page
    .getByLabel(/futures/i)
    .first()
    .fill('20');
  await page.getByRole('button', { name: /^Start/ }).click();
  const onTrack = page.getByRole('region', { name: 'On track' });
  await expect(onTrack.getByText(/is (ahead|behind|on track): .* m² are covered/)).toBeVisible({
    timeout: 120_000,
  });
  await onTrack.getByLabel('Survey', { exact: true }).selectOption('2029');
  await expect(onTrack.getByRole('row', { name: /^Behind/ })).toContainText('m²');
});
