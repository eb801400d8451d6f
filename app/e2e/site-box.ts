import type { Page } from '@playwright/test';

/** Where the site lies in the window, px: maps show it whole, with room around it. */
export async function siteBox(page: Page) {
  const box = await page.locator('[data-site-sheet]').first().boundingBox();
  if (!box) throw new Error('There is no site on the map');
  return box;
}

/** Presses a place of the map, given as fractions of the site from its north-west corner. */
export async function pressSite(page: Page, x: number, y: number, twice = false): Promise<void> {
  const map = page.getByRole('application').first();
  const [site, whole] = [await siteBox(page), (await map.boundingBox())!];
  const position = { x: site.x - whole.x + site.width * x, y: site.y - whole.y + site.height * y };
  await (twice ? map.dblclick({ position }) : map.click({ position }));
}
