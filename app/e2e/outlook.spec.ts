import { fillPath } from '#contract/endpoint.ts';
import { getSite } from '#contract/sites.ts';
import { demoAddresses } from './addresses.ts';
import { demoPeople } from './people.ts';
import { smallSite } from './small-site.ts';
import { expect, signIn, test } from './test.ts';

/** Sixty-six invented years; three in a row are dry from every eleventh on. The fifth line is no number. */
function invented(): string[] {
  const lines = Array.from(
    { length: 66 },
    (_, i) => `${1960 + i};${i % 11 < 3 ? '-1,8' : (0.3 + (i % 4) / 10).toFixed(1).replace('.', ',')}`,
  );
  lines[3] = '1963;dry';
  return ['\uFEFFyear;spei', ...lines];
}

test('a drought record is mended, kept, fitted and drawn from; a run is cautioned by it', async ({
  page,
}) => {
  await signIn(page, demoPeople.modeller);
  const { teamId } = await demoAddresses(page);
  const siteId = await smallSite(page, teamId, 'Outlook Marsh');
  await page.goto(`/sites/${siteId}/outlook`);

  await test.step('a bad row is named with its line, and nothing is taken', async () => {
    await page.getByRole('button', { name: 'Take a drought record' }).click();
    await page.getByLabel(/Drop a CSV here/).setInputFiles({
      name: 'invented-station.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from(invented().join('\r\n')),
    });
    await page.getByText('SPEI or SPI', { exact: true }).click();
    await expect(page.getByRole('alert')).toContainText('Line 5: Found “dry” where a number was expected');
    await expect(page.getByRole('button', { name: 'Use this record' })).toBeDisabled();
  });

  await test.step('mended, it shows by year on the Palmer scale and is kept', async () => {
    const lines = page.getByLabel('Paste it here');
    await lines.fill((await lines.inputValue()).replace('1963;dry', '1963;0,4'));
    await expect(page.getByText('66 years, 1960 to 2025')).toBeVisible();
    await page.getByRole('button', { name: 'Use this record' }).click();
    await expect(page.getByText(/Read as an SPEI or SPI, times 2 on the Palmer scale/)).toBeVisible();
    const site = getSite.reply.parse(
      await (await page.request.get(fillPath(getSite.path, { siteId }))).json(),
    );
    expect(site.droughtRecord?.years[1]).toEqual({ year: 1961, index: -3.6 });
  });

  await test.step('droughts that come back are fitted, taken and saved', async () => {
    await page.getByRole('button', { name: 'Fit the weather to it' }).click();
    await expect(page.getByText(/One begins every 11 years on average/)).toBeVisible();
    await page.getByRole('button', { name: 'Use this fit' }).click();
    await expect(page.getByLabel('Index in a drought')).toHaveValue('-3.6');
    await page.getByLabel('Index units that each decade shifts the weather by').fill('-0,2');
    await page.getByRole('button', { name: /^(Save|Keep)/ }).click();
    await expect(page.getByRole('link', { name: 'On to Options' })).toBeVisible();
  });

  await test.step('the chance of a killing year is drawn, and can be read', async () => {
    await expect(page.getByText(/a killing year has come on/)).toBeVisible();
    const table = page.getByRole('figure').filter({ hasText: 'killing year has come' });
    await table.getByText('Read as a table').click();
    await expect(table.getByRole('table')).toContainText('open marsh');
  });

  await test.step('a further outlook is kept, without grazers, and offered to comparisons', async () => {
    await page.getByRole('button', { name: 'Add another' }).click();
    await page.getByLabel('Name', { exact: true }).fill('No grazers');
    await page.getByRole('button', { name: 'Add it' }).click();
    await expect(page.getByRole('radio', { name: 'No grazers' })).toBeChecked();
    await page.getByLabel('Grazers come, as the plant says').uncheck();
    await page.getByRole('button', { name: 'Save the outlook' }).click();
    await expect(page.getByRole('link', { name: 'On to Options' })).toBeVisible();
    await page.goto(`/sites/${siteId}/compare`);
    await expect(page.getByLabel(/No grazers, drawn anew/)).toBeVisible();
  });

  await test.step('a run starts with the trend, and keeps its caution', async () => {
    await page.goto(`/sites/${siteId}/runs`);
    await page.getByText(/Belief outruns data/).click();
    await expect(page.getByText(/A trend is assumed: an index 0.4 lower by the horizon/)).toBeVisible();
    await page.getByRole('button', { name: 'Start the run' }).click();
    await expect(page).toHaveURL(/\/runs\/[\w-]+/);
    await page.getByText(/Belief outruns data/).click();
    await expect(page.getByText(/A trend is assumed/)).toBeVisible();
  });
});
