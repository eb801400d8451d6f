import type { Site } from '#contract/sites.ts';
import AxeBuilder from '@axe-core/playwright';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from '@playwright/test';
import { groundFiles } from './ground-files.ts';
import { demoPeople } from './people.ts';
import { expect, signIn, test } from './test.ts';

const fixtures = join(import.meta.dirname, '../../rasters/fixtures');
const fixture = (name: string) => ({
  name,
  mimeType: 'image/tiff',
  buffer: readFileSync(join(fixtures, name)),
});
const text = (name: string, mimeType: string, content: string) => ({
  name,
  mimeType,
  buffer: Buffer.from(content),
});
/** What the accessibility rules find wrong on the page as it stands. */
const violations = async (page: Page) =>
  (await new AxeBuilder({ page }).analyze()).violations.map(({ id, nodes }) => `${id}: ${nodes[0].html}`);
const section = (page: Page, name: string) => page.getByRole('region', { name, exact: true });
const drop = (page: Page) => page.getByLabel(/Drop GeoTIFFs here/);

test('a team’s own rasters, whatever they look like, become the ground of runs', async ({ page }) => {
  await signIn(page, demoPeople.modeller);

  await test.step('a site from a raster, with the grid that follows from it', async () => {
    await page.getByRole('link', { name: 'New site' }).click();
    await page.getByLabel('Name of the site').fill('Any Marsh');
    await page.getByLabel(/Drop a GeoTIFF here/).setInputFiles(groundFiles.habitat);
    await expect(section(page, 'Working grid')).toContainText('160 × 176 cells of 5 m');
    await page.getByRole('button', { name: 'Make the site' }).click();
    await expect(page).toHaveURL(/\/sites\/[\w-]+\/ground/);
    await expect(section(page, 'Habitat')).toContainText('habitat.tif');
  });

  await test.step('classes from CSV: refused by row, then taken', async () => {
    const table = page.getByLabel('Class table as CSV');
    const csv = (capacity: string) =>
      text(
        'classes.csv',
        'text/csv',
        `value;name;colour;capacity;vigour\n1;Creek;#8496a2;0;0\n2;Marsh;#5f8a5e;${capacity};1\n`,
      );
    await table.setInputFiles(csv('9'));
    await expect(page.getByText(/capacity: found “9”/)).toContainText('Row 3');
    await table.setInputFiles(csv('0,9'));
    await expect(page.getByLabel('Capacity of class 2')).toHaveValue('0.9');
    await page.getByRole('button', { name: 'Save the class table' }).click();
    await expect(page.getByRole('button', { name: 'Save the class table' })).toBeHidden();
  });

  await test.step('three files at once: as they are, in degrees, and unusable', async () => {
    await drop(page).setInputFiles([
      groundFiles.cover,
      fixture('mend-degrees.tif'),
      fixture('bad-rotated.tif'),
    ]);
    await expect(page.getByText('bad-rotated.tif was refused.')).toBeVisible();
    await expect(page.getByText(/In degrees: WGS 84 \(EPSG:4326\)/)).toBeVisible();
    await page.getByLabel('The part that mend-degrees.tif plays').selectOption('exposure');
    await expect(page.getByText(/of the site is not reached and gets no data/)).toBeVisible();
    await page.reload();
    await page.getByRole('button', { name: 'Place it as exposure' }).click();
    await page.getByRole('button', { name: 'Place it as cover' }).click();
    await expect(section(page, 'Exposure')).toContainText(/Brought onto the grid from WGS 84/);
    await expect(section(page, 'Cover')).toContainText(/Taken cell by cell/);
    await page.getByRole('button', { name: 'Take it off the list bad-rotated.tif' }).click();
    await expect(page.getByText('bad-rotated.tif was refused.')).toBeHidden();
  });

  const engine = section(page, 'What the engine will see');
  await test.step('a curve of elevation by keyboard, and what the engine makes of it', async () => {
    await expect(engine).toContainText('66 ha, 94 %');
    await drop(page).setInputFiles(groundFiles.elevation);
    await page.getByRole('button', { name: 'Place it as elevation' }).click();
    await page.getByRole('button', { name: 'Draw one' }).click();
    await page.getByRole('slider', { name: 'Point 1 of capacity' }).focus();
    for (let i = 0; i < 10; i++) await page.keyboard.press('Shift+ArrowDown');
    await expect(page.getByText(/Capacity: 0 % up to 0\.0\d m, 100 % from/)).toBeVisible();
    for (let i = 0; i < 5; i++) await page.keyboard.press('Shift+ArrowRight');
    expect(await violations(page)).toEqual([]);
    await page.getByRole('button', { name: 'Save the curves' }).click();
    await expect(page.getByRole('button', { name: 'Save the curves' })).toBeHidden();
    await page.getByRole('radiogroup', { name: 'The engine will see' }).getByText('capacity').click();
    await expect(
      page.getByRole('application', { name: /capacity, as the engine will see it/ }),
    ).toBeVisible();
    await expect(engine).not.toContainText('66 ha, 94 %');
    await expect(engine.getByText(/Cover stands on ground that cannot hold the plant/)).toBeVisible();
  });

  await test.step('surveyed mounds from GeoJSON, looked at before they are kept', async () => {
    await page.getByRole('button', { name: 'Import points or areas' }).click();
    const point = (name: string, lon: number, lat: number) => ({
      type: 'Feature',
      properties: { name, radius: 6 },
      geometry: { type: 'Point', coordinates: [lon, lat] },
    });
    const features = [point('Old reef', 1.832, 47.868), point('Elsewhere', 12, 50)];
    await page
      .getByLabel(/Drop a GeoJSON or CSV here/)
      .setInputFiles(
        text(
          'reefs.geojson',
          'application/geo+json',
          JSON.stringify({ type: 'FeatureCollection', features }),
        ),
      );
    await expect(page.getByRole('dialog').getByText('Row 2:')).toBeVisible();
    expect(await violations(page)).toEqual([]);
    await page.getByRole('button', { name: 'Keep the 1 good one' }).click();
    await expect(section(page, 'Points and areas')).toContainText('Old reef, disc of 6 m radius');
    await expect(engine.getByRole('button', { name: 'surveyed refuge there' })).toBeVisible();
    await expect(engine).not.toContainText('surveyed refuge therenone');
  });

  await test.step('a replaced layer stays in the history and can be put back; removing warns', async () => {
    await page.getByLabel('File to replace cover').setInputFiles(groundFiles.resurvey);
    await page.getByRole('button', { name: 'Place it as cover' }).click();
    await expect(section(page, 'Cover')).toContainText('cover-resurvey.tif');
    await page.getByRole('button', { name: 'history of cover' }).click();
    await page.getByRole('button', { name: 'Put back cover.tif' }).click();
    await expect(section(page, 'Cover')).not.toContainText('cover-resurvey.tif');
    await page.getByRole('button', { name: 'remove cover' }).click();
    await expect(page.getByRole('alertdialog')).toContainText('No run stands on it.');
    await page.getByRole('button', { name: 'Keep it' }).click();
  });

  await test.step('a coarser working cell, with what it means said before', async () => {
    await page.getByRole('button', { name: 'Another cell size' }).click();
    // No run can start on such cells with a plant that spreads half a metre a year.
    await expect(page.getByRole('radio', { name: '10 m' })).toBeDisabled();
    const [, siteId] = /sites\/([\w-]+)/.exec(page.url())!;
    const { plant } = (await (await page.request.get(`/api/sites/${siteId}`)).json()) as Site;
    const faster = { ...plant, rates: { ...plant.rates, lateralSpread: 8 } };
    const saved = await page.request.put(`/api/sites/${siteId}/plant`, {
      data: faster,
      headers: { origin: new URL(page.url()).origin },
    });
    expect(saved.status()).toBe(200);
    await page.reload();
    await page.getByRole('button', { name: 'Another cell size' }).click();
    await page.getByRole('radio', { name: '10 m' }).check();
    await page.getByRole('button', { name: 'Use cells of 10 m' }).click();
    await expect(page.getByText('80 × 88 cells of 10 m')).toBeVisible();
    await expect(section(page, 'Elevation')).toContainText(/by the area of the cells beneath/);
    await expect(engine).toContainText('can hold the plant');
  });
});
