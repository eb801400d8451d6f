import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import type { Page } from '@playwright/test';
import { demoGrid } from '#rasters/demo/sallow-reach.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import { demoPeople } from './people.ts';
import { pressSite } from './site-box.ts';
import { writeRasters } from './raster-files.ts';
import { expect, signIn, test } from './test.ts';

const step = (page: Page, name: string) =>
  page.getByRole('navigation').getByRole('link', { name: new RegExp(`^${name}`) });
const yearline = (page: Page) => page.getByRole('slider', { name: /Year of/ });

async function download(
  page: Page,
  link: string | RegExp,
): Promise<{ path: string; name: string; bytes: Buffer }> {
  const [file] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: link }).click(),
  ]);
  const path = await file.path();
  return { path, name: file.suggestedFilename(), bytes: readFileSync(path) };
}

/** What GDAL reads, where it is installed. */
function gdalinfo(path: string): { crs: string; origin: number[]; noData: unknown } | undefined {
  const { stdout, error } = spawnSync('gdalinfo', ['-json', path], { encoding: 'utf8' });
  if (error) return undefined;
  const info = JSON.parse(stdout) as {
    coordinateSystem: { wkt: string };
    geoTransform: number[];
    bands: { noDataValue: unknown }[];
  };
  return { crs: info.coordinateSystem.wkt, origin: info.geoTransform, noData: info.bands[0].noDataValue };
}

test('from a GeoTIFF to a run that is replayed, repeated and exported', async ({ page }) => {
  const rasters = writeRasters();
  await signIn(page, demoPeople.modeller);

  await test.step('make a site by dropping a GeoTIFF', async () => {
    await page.getByRole('link', { name: 'New site' }).click();
    await page.getByLabel('Name of the site').fill('Journey Marsh');
    await page.getByLabel(/Drop a GeoTIFF here/).setInputFiles(rasters.habitat);
    await page.getByRole('button', { name: 'Make the site' }).click();
    await expect(page).toHaveURL(/\/sites\/[\w-]+\/ground/);
    await expect(page.getByText('640 × 372 cells of 1 m')).toBeVisible();
  });

  await test.step('set the classes', async () => {
    await page.getByLabel('Name of class 1').fill('Creek');
    for (const [value, capacity, vigour] of [
      [1, '0', '0'],
      [2, '0.7', '0.9'],
      [3, '0.95', '1'],
      [4, '0.9', '0.8'],
      [5, '1', '1'],
    ] as const) {
      await page.getByLabel(`Capacity of class ${value}`).fill(capacity);
      await page.getByLabel(`Vigour of class ${value}`).fill(vigour);
    }
    await page.getByRole('button', { name: 'Save the class table' }).click();
    await expect(page.getByRole('button', { name: 'Save the class table' })).toBeHidden();
  });

  await test.step('add cover and refuge', async () => {
    await page.getByLabel(/Drop GeoTIFFs here/).setInputFiles([rasters.cover, rasters.refuge]);
    await page.getByRole('button', { name: 'Place 2 files' }).click();
    await expect(step(page, 'Ground')).toContainText('3 layers');
  });

  await test.step('look at the rates, and set an outlook of 12 years', async () => {
    await step(page, 'Plant').click();
    await page.getByRole('textbox', { name: /^Lateral spread/ }).fill('0');
    await expect(page.getByText(/must lie between 0.005 and 20/).first()).toBeVisible();
    await page.getByRole('textbox', { name: /^Lateral spread/ }).fill('1.5');
    await page.getByRole('button', { name: 'Save the plant' }).click();
    await expect(page.getByRole('link', { name: 'On to Outlook' })).toBeVisible();
    await step(page, 'Outlook').click();
    await page.getByLabel('Years to simulate').fill('12');
    await page.getByRole('button', { name: 'Save the outlook' }).click();
    await expect(step(page, 'Outlook')).toContainText('12 years');
  });

  await test.step('place mounds beside Wait', async () => {
    await step(page, 'Options').click();
    await page.getByRole('button', { name: 'Add an option' }).click();
    await page.getByLabel('Name of the option').fill('Three mounds');
    await page.getByRole('button', { name: 'Add it' }).click();
    await page.getByRole('radio', { name: 'Mounds: one by one' }).check();
    await expect(page.locator('[data-painted=true]')).toBeVisible();
    // Bare ground in the west and the east of the invented site.
    for (const [x, y] of [
      [0.1, 0.6],
      [0.12, 0.75],
      [0.85, 0.2],
    ])
      await pressSite(page, x, y);
    await expect(
      page
        .getByRole('complementary')
        .getByText(/3 mounds/)
        .first(),
    ).toBeVisible();
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(
      page
        .getByRole('complementary')
        .getByText(/2 mounds/)
        .first(),
    ).toBeVisible();
    await page.getByRole('button', { name: 'Redo' }).click();
    await page.getByRole('button', { name: 'Save', exact: true }).click();
    await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
  });

  let runAddress = '';
  await test.step('run, pause, step and let it end', async () => {
    await page.getByRole('link', { name: 'Set up a run' }).click();
    await page.getByRole('button', { name: 'Start the run' }).click();
    await expect(page).toHaveURL(/\/runs\/[\w-]+/);
    runAddress = page.url();
    await expect(page.getByRole('button', { name: 'Run again and compare the digest' })).toBeVisible({
      timeout: 90_000,
    });
    await expect(yearline(page)).toHaveAttribute('aria-valuemax', '2038');
  });

  await test.step('scrub along the yearline', async () => {
    await yearline(page).focus();
    await page.keyboard.press('Home');
    await expect(yearline(page)).toHaveAttribute('aria-valuenow', '2026');
    await page.keyboard.press('ArrowRight');
    await expect(yearline(page)).toHaveAttribute('aria-valuetext', /2027.*cover/);
    const box = (await yearline(page).boundingBox())!;
    await page.mouse.click(box.x + box.width * 0.5, box.y + box.height * 0.5);
    const middle = Number(await yearline(page).getAttribute('aria-valuenow'));
    expect(middle).toBeGreaterThan(2028);
    expect(middle).toBeLessThan(2037);
  });

  await test.step('reload and replay: everything is still there', async () => {
    await page.goto(`${runAddress.split('?')[0]}?year=2030`);
    await expect(yearline(page)).toHaveAttribute('aria-valuenow', '2030');
    await page.getByRole('button', { name: 'Play' }).click();
    await expect(yearline(page)).not.toHaveAttribute('aria-valuenow', '2030');
    await page.getByText('closing year', { exact: true }).click();
    await expect(page).toHaveURL(/show=closing/);
  });

  await test.step('run again: the digest agrees', async () => {
    await page.getByRole('button', { name: 'Run again and compare the digest' }).click();
    await expect(page.getByText('The digest agrees.')).toBeVisible({ timeout: 90_000 });
  });

  await test.step('export the series and maps that others can read', async () => {
    await page.goto(`${runAddress.split('?')[0]}?year=2030`);
    const series = await download(page, 'Series, CSV');
    const lines = series.bytes.toString('utf8').trimEnd().split('\r\n');
    expect(lines).toHaveLength(1 + 13);

    const frame = await download(page, /Cover in 2030/);
    const raster = await readRaster(new Uint8Array(frame.bytes));
    expect(raster.grid).toEqual(demoGrid);

    const closing = await download(page, /Closing years/);
    expect((await readRaster(new Uint8Array(closing.bytes))).dataType).toBe('int16');
    const seen = gdalinfo(closing.path);
    if (seen) {
      expect(seen.crs).toContain('UTM zone 31N');
      expect(seen.origin).toEqual([demoGrid.originX, 1, 0, demoGrid.originY, 0, -1]);
      expect(seen.noData).toBe(-32768);
    }
  });
});

test('a run that its tab left keeps every frame that was saved', async ({ page }) => {
  await signIn(page, demoPeople.manager);
  await page.getByRole('link', { name: 'Sallow Reach' }).first().click();
  await step(page, 'Runs').click();
  await page.getByRole('button', { name: 'Start the run' }).click();
  await expect(page).toHaveURL(/\/runs\/[\w-]+/);
  await page.getByRole('button', { name: 'Pause' }).click();
  await expect(page.getByRole('button', { name: 'One year on' })).toBeEnabled();
  await page.getByRole('button', { name: 'One year on' }).click();
  await expect(page.getByText(/[1-9]\d* of 35 years stored/)).toBeVisible();
  const stored = Number(
    /(\d+) of 35/.exec((await page.getByText(/of 35 years stored/).textContent()) ?? '')?.[1],
  );
  page.on('dialog', (dialog) => void dialog.accept());
  await page.reload();
  await expect(page.getByRole('button', { name: 'Run from the start' })).toBeVisible();
  expect(Number(await yearline(page).getAttribute('aria-valuemax'))).toBeGreaterThanOrEqual(
    2026 + stored - 1,
  );
});
