import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { demoPeople } from './people.ts';
import { writeRasters } from './raster-files.ts';
import { expect, signIn, test } from './test.ts';

const fixtures = join(import.meta.dirname, '../../rasters/fixtures');

test('a file that cannot be used is refused with what was found and how to mend it', async ({ page }) => {
  const { habitat } = writeRasters();
  await signIn(page, demoPeople.modeller);
  await page.getByRole('link', { name: 'New site' }).click();
  await page.getByLabel('Name of the site').fill('Refused');
  const send = async (name: string, bytes: Buffer) => {
    await page
      .getByLabel(/Drop a GeoTIFF here|choose another/)
      .setInputFiles({ name, mimeType: 'image/tiff', buffer: bytes });
    await expect(page.getByText(`${name} was refused.`)).toBeVisible();
  };
  const whole = readFileSync(habitat);
  await send('cut-short.tif', whole.subarray(0, whole.length >> 1));
  await send('picture.tif', Buffer.from('\x89PNG\r\n\x1a\n and so on', 'latin1'));
  await send('rotated.tif', readFileSync(join(fixtures, 'bad-rotated.tif')));
  await expect(page.getByText(/gdalwarp/)).toBeVisible();
  await expect(page.getByRole('button', { name: 'Make the site' })).toBeDisabled();
  await page.goto('/');
  await expect(page.getByRole('link', { name: 'Refused' })).toHaveCount(0);
});
