import { demoAddresses } from './addresses.ts';
import { expectOnMap, expectPassable } from './notes.ts';
import { demoPeople } from './people.ts';
import { siteBox } from './site-box.ts';
import { expect, signIn, test } from './test.ts';

test.use({ viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true });

test('a plan is drawn by finger on a phone', async ({ page }) => {
  await signIn(page, demoPeople.manager);
  const { siteId } = await demoAddresses(page);
  await page.goto(`/sites/${siteId}/options`);
  await page.getByRole('button', { name: 'Add an option' }).click();
  await page.getByLabel('Name of the option').fill('Drawn by finger');
  await page.getByRole('button', { name: 'Add it' }).click();
  await expect(page.getByRole('heading', { name: 'Works in Drawn by finger' })).toBeVisible();
  const map = page.getByRole('application');
  await page.evaluate(() => window.scrollTo(0, 0));
  await expect(page.locator('[data-painted="true"]')).toBeVisible();
  const works = (words: string) =>
    page.getByRole('table', { name: /^Works in .*, by year$/ }).getByText(words, { exact: true });
  const tap = async (x: number, y: number) => {
    const box = await siteBox(page);
    await page.touchscreen.tap(box.x + box.width * x, box.y + box.height * y);
  };

  await test.step('the map comes first, and shows the whole site clear of its legend', async () => {
    await expect(map).toBeInViewport({ ratio: 1 });
    const [site, all] = [await siteBox(page), (await map.boundingBox())!];
    expect(site.x).toBeGreaterThan(all.x);
    expect(site.x + site.width).toBeLessThan(all.x + all.width);
    const legend = (await page.locator('summary').filter({ hasText: 'Legend' }).boundingBox())!;
    expect(site.y + site.height).toBeLessThanOrEqual(legend.y);
  });

  await test.step('a creek is refused where it was pressed', async () => {
    await page.getByRole('button', { name: 'Show the whole site' }).tap();
    // The creek leaves the site in the east.
    await tap(0.97, 0.52);
    const note = page.getByRole('alert').filter({ hasText: /Not here\..*cannot grow there/ });
    await expectOnMap(page, note);
    await expectPassable(note);
    await tap(0.4, 0.6);
    await expect(works('1 mound')).toBeAttached();
    await expect(note).toBeHidden();
  });

  await test.step('a pattern is placed by a button in view', async () => {
    await page.getByLabel('Tool').selectOption('scattered');
    const place = page.getByRole('button', { name: 'Place 40 mounds' });
    await expect(place).toBeInViewport({ ratio: 1 });
    await page.getByLabel('Tool').selectOption('select');
    await expect(place).toBeInViewport({ ratio: 1 });
    await place.tap();
    await expect(works('41 mounds')).toBeAttached();
  });

  await test.step('nothing is wider than the screen, and the last words stand clear of the bar', async () => {
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
    await page.evaluate(() => window.scrollTo(0, document.body.scrollHeight));
    const last = (await page.getByText(/Follow local codes and licensed practice/).boundingBox())!;
    const bar = (await page.getByRole('button', { name: 'Save', exact: true }).boundingBox())!;
    expect(last.y + last.height).toBeLessThanOrEqual(bar.y);
  });
});
