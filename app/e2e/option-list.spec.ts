import { readFileSync } from 'node:fs';
import type { Browser, Page } from '@playwright/test';
import { listOptions, type Option } from '#contract/options.ts';
import { fillPath } from '#contract/endpoint.ts';
import { demoAddresses } from './addresses.ts';
import { demoPeople } from './people.ts';
import { expect, signIn, test } from './test.ts';

async function download(page: Page, link: string): Promise<{ path: string; text: string }> {
  const [file] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: link }).click(),
  ]);
  const path = await file.path();
  return { path, text: readFileSync(path, 'utf8') };
}

const more = async (page: Page, item: string) => {
  await page.getByRole('button', { name: 'More', exact: true }).click();
  await page.getByRole('menuitem', { name: item, exact: true }).click();
};
const entry = (page: Page, name: string) =>
  page
    .getByRole('main')
    .getByRole('listitem')
    .filter({ has: page.locator('canvas') })
    .filter({ hasText: name })
    .getByRole('button');

test('two people draw on one option and lose nothing; options are ordered, archived, taken out and in', async ({
  page,
  browser,
}) => {
  await signIn(page, demoPeople.manager);
  const { siteId } = await demoAddresses(page);
  const optionsNow = async (): Promise<Option[]> =>
    listOptions.reply.parse(await (await page.request.get(fillPath(listOptions.path, { siteId }))).json())
      .options;
  const named = async (name: string) => (await optionsNow()).find((option) => option.name === name);
  const remove = async (who: Page, number: number) => {
    await who.getByRole('button', { name: 'Read as a table' }).click();
    await who.getByRole('button', { name: `Remove number ${number}`, exact: true }).click();
  };
  const save = (who: Page) => who.getByRole('button', { name: 'Save', exact: true }).click();

  await test.step('copy an option', async () => {
    await page.goto(`/sites/${siteId}/options`);
    await page.getByRole('button', { name: 'Copy', exact: true }).click();
    await page.getByLabel('Name of the option').fill('Contested');
    await page.getByRole('button', { name: 'Copy it' }).click();
    await expect(entry(page, 'Contested')).toHaveAttribute('aria-current', 'true');
  });
  const contested = (await named('Contested'))!;
  const [first, second] = contested.works;

  const other = await openFor(
    browser,
    demoPeople.modeller,
    `/sites/${siteId}/options?option=${contested.id}`,
  );
  await test.step('two take away different works; both changes are put together', async () => {
    await remove(other, 2);
    await remove(page, 1);
    await save(page);
    await expect(page.getByText('Saved.')).toBeVisible();
    await save(other);
    const notice = other.getByRole('alert').filter({ hasText: 'Ines Marlow changed this option meanwhile.' });
    await expect(notice).toContainText('Theirs1 mound removed');
    await notice.getByRole('button', { name: 'Put both together' }).click();
    await save(other);
    await expect(other.getByText('Saved.')).toBeVisible();
    const ids = (await named('Contested'))!.works.map(({ id }) => id);
    expect(ids).toEqual(contested.works.slice(2).map(({ id }) => id));
  });

  await test.step('a second drawing on what is out of date is kept as a copy', async () => {
    await page.getByRole('button', { name: 'Remove number 3', exact: true }).click();
    await save(page);
    await page.getByRole('button', { name: 'Keep mine as a copy' }).click();
    await expect(entry(page, 'Contested (copy)')).toHaveAttribute('aria-current', 'true');
    const copy = (await named('Contested (copy)'))!;
    expect([copy.works.length, copy.works.some(({ id }) => id === second.id)]).toEqual([
      contested.works.length - 2,
      true,
    ]);
  });

  await test.step('the history brings the first state back', async () => {
    await entry(page, 'Contested').first().click();
    await more(page, 'History');
    await page.getByRole('button', { name: 'Bring revision 1 back' }).click();
    await expect(page.getByRole('dialog')).toHaveCount(0);
    expect((await named('Contested'))!.works).toEqual(contested.works);
    expect(first).toBeDefined();
  });

  await test.step('move it up, by keys; archive it and bring it back', async () => {
    const placeNow = async () => (await optionsNow()).map(({ name }) => name).indexOf('Contested');
    const before = await placeNow();
    for (const name of ['Contested', 'Contested']) {
      const place = entry(page, name).first();
      await place.focus();
      await place.press('Alt+ArrowLeft');
    }
    await expect.poll(placeNow).toBe(before - 2);
    await more(page, 'Archive');
    await expect(page.getByText('Archive: 1 option')).toBeVisible();
    await expect(page.getByText(/Contested is in the archive\. Bring it back/)).toBeVisible();
    await more(page, 'Bring back from the archive');
    await expect(page.getByText('Archive: 1 option')).toHaveCount(0);
  });

  await test.step('costs show beside each option', async () => {
    await page.getByRole('button', { name: 'Costs', exact: true }).click();
    await page.getByLabel('Cost of a mound').fill('1000');
    for (const free of ['Cost of a planted clump', 'Cost of a visit', 'Fixed cost of every year'])
      await page.getByLabel(free).fill('0');
    await page.getByLabel('Budget, empty where there is none').fill('30000');
    await page.getByRole('button', { name: 'Save the costs' }).click();
    await expect(entry(page, 'Contested').first()).toContainText('€40,000, €10,000 over');
  });

  await test.step('out as GeoJSON and in again; out to the crew', async () => {
    await more(page, 'Files and crew list');
    const geoJson = await download(page, 'GeoJSON, longitude and latitude');
    await page.getByLabel('Works of which year').selectOption('2028');
    const gpx = await download(page, 'GPX for receivers');
    const due = contested.works.filter((work) => work.year === 2028);
    expect(gpx.text.match(/<wpt /g)).toHaveLength(due.length);
    await page.getByRole('button', { name: 'Close' }).click();
    await more(page, 'Works from a file');
    await page.locator('input[type=file]').setInputFiles({
      name: 'again.geojson',
      mimeType: 'application/geo+json',
      buffer: Buffer.from(geoJson.text),
    });
    await expect(page.getByText(/^Found 40 mounds/)).toBeVisible();
    await page.getByLabel('Name of the option').fill('From a file');
    await page.getByRole('button', { name: 'Save as an option' }).click();
    await expect(entry(page, 'From a file')).toHaveAttribute('aria-current', 'true');
    expect((await named('From a file'))!.works).toEqual(contested.works);
  });
  await other.close();
});

async function openFor(browser: Browser, email: string, path: string): Promise<Page> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, locale: 'en-GB' });
  const page = await context.newPage();
  await signIn(page, email);
  await page.goto(path);
  return page;
}
