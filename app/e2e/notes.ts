import type { Locator, Page } from '@playwright/test';
import { expect } from './test.ts';

/** All of a note stands on the map, and is not covered by anything else. */
export async function expectOnMap(page: Page, note: Locator): Promise<void> {
  await expect(note).toBeVisible();
  const map = (await page.getByRole('application').boundingBox())!;
  const box = (await note.boundingBox())!;
  expect(box.x).toBeGreaterThanOrEqual(map.x);
  expect(box.y).toBeGreaterThanOrEqual(map.y);
  expect(box.x + box.width).toBeLessThanOrEqual(map.x + map.width);
  expect(box.y + box.height).toBeLessThanOrEqual(map.y + map.height);
}

/** A press on a note goes to the map below it. */
export async function expectPassable(note: Locator): Promise<void> {
  const below = await note.evaluate((element) => {
    const { left, top, width, height } = element.getBoundingClientRect();
    return document.elementFromPoint(left + width / 2, top + height / 2)?.getAttribute('role');
  });
  expect(below).toBe('application');
}
