import { comparisonSchema } from '#contract/comparisons.ts';
import { demoAddresses } from './addresses.ts';
import { demoPeople } from './people.ts';
import { smallSite } from './small-site.ts';
import { expect, signIn, test } from './test.ts';

test('a modeller says what is not known of a rate, keeps the plant as a version and compares with it', async ({
  page,
}) => {
  await signIn(page, demoPeople.modeller);
  const { teamId } = await demoAddresses(page);
  const siteId = await smallSite(page, teamId, 'Believed Marsh');
  const button = (name: string | RegExp) => page.getByRole('button', { name });
  const dialog = page.getByRole('dialog');

  await test.step('take a starting profile, then a triangular spread in its place', async () => {
    await page.goto(`/sites/${siteId}/plant`);
    await expect(page.getByText('taken from no profile')).toBeVisible();
    await button('Take a profile').click();
    await button('Take starting values of Smooth cordgrass (Spartina alterniflora)').click();
    await expect(page.getByText(/Feist & Simenstad 2000/)).toBeVisible();
    await button(/(Say so|source) for lateral spread$/).click();
    await page.getByLabel('Lateral spread: known as').selectOption('uniform');
    await page.getByLabel('Lateral spread: highest').fill('99');
    await expect(page.getByText(/Found 99; Lateral spread must lie between 0.005 and 20/)).toBeVisible();
    await page.getByLabel('Lateral spread: known as').selectOption('triangular');
    await page.getByLabel('Lateral spread: lowest').fill('1.2');
    await page.getByLabel('Lateral spread: highest').fill('2.2');
    await page.getByLabel('Lateral spread: most likely').fill('1.7');
    await expect(page.getByText(/between 1.2 and 2.2, most likely 1.7 m\/yr/)).toBeVisible();
    await expect(page.getByText(/nine tenths of the draws lie between 1\.\d+ and 2/)).toBeVisible();
    // Too fast a fill-in beside a slow front would be refused; this one is known.
    await button(/(Say so|source) for fill-in rate$/).click();
    await page.getByLabel('Fill-in rate: known as').selectOption('fixed');
  });

  await test.step('hold it against a number from the field', async () => {
    await page.getByLabel('A straight edge advanced by, m/yr').fill('0.5');
    await page.getByLabel('A straight edge advanced by: plus or minus, m/yr').fill('0,1');
    await expect(page.getByText(/The rates are too fast: they imply/)).toBeVisible();
    await page.getByLabel('A straight edge advanced by, m/yr').fill('1.6');
    await expect(page.getByText(/Agrees: the rates imply/)).toBeVisible();
  });

  await test.step('keep it in the library, twice', async () => {
    await button('Keep in the library').click();
    await dialog.getByLabel('What changed, or what it rests on').fill('staked edges');
    await dialog.getByRole('button', { name: 'Keep it' }).click();
    await expect(
      page.getByText('Taken from “Smooth cordgrass (Spartina alterniflora)”, version 1.'),
    ).toBeVisible();
    await page.getByLabel('Lateral spread: highest').fill('2.1');
    await button('Keep in the library').click();
    await dialog.getByRole('button', { name: 'Keep it' }).click();
    await expect(page.getByText(/version 2\.$/)).toBeVisible();
    await page.reload();
    await expect(page.getByText(/between 1.2 and 2.1, most likely 1.7 m\/yr/)).toBeVisible();
    await button('Take a profile').click();
    await expect(dialog.getByLabel(/^Version of Smooth cordgrass/)).toHaveValue('2');
    await page.keyboard.press('Escape');
  });

  await test.step('start a comparison with rates as believed; it says what was uncertain', async () => {
    await page.goto(`/sites/${siteId}/compare`);
    await expect(page.getByLabel('Rates that are not known exactly')).toHaveValue('believed');
    await page.getByLabel('Futures of each option').fill('6');
    const registered = page.waitForResponse(
      (response) => response.request().method() === 'POST' && response.url().endsWith('/comparisons'),
    );
    await button('Start the comparison').click();
    const { plan } = comparisonSchema.parse(await (await registered).json());
    expect(plan.common.uncertain).toMatchObject({
      draws: 6,
      rates: { lateralSpread: { law: 'triangular', low: 1.2, mode: 1.7, high: 2.1 } },
    });
    await expect(page.getByRole('main').getByText('finished, 6 of 6 futures')).toBeVisible();
    await page.getByText('What is not known.').click();
    await expect(page.getByText('between 1.2 and 2.1, most likely 1.7 m/yr')).toBeVisible();
    await page.getByRole('slider', { name: /^Futures of Clumps/ }).press('ArrowRight');
    await expect(page.getByText(/It drew lateral spread 1\.\d+ m\/yr, /).first()).toBeVisible();
  });
});
