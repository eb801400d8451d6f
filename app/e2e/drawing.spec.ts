import type { Locator, Page } from '@playwright/test';
import { demoPeople } from './people.ts';
import { expectOnMap, expectPassable } from './notes.ts';
import { pressSite, siteBox } from './site-box.ts';
import { expect, signIn, test } from './test.ts';

const step = (page: Page, name: string) =>
  page.getByRole('navigation').getByRole('link', { name: new RegExp(`^${name}`) });
const tool = (page: Page, name: string) => page.getByRole('radio', { name, exact: true });
const map = (page: Page) => page.getByRole('application');
/** A line of the works by year in the margin, such as `12 mounds`. */
const works = (page: Page, words: string) =>
  page.getByRole('table', { name: /^Works in .*, by year$/ }).getByText(words, { exact: true });

async function addOption(page: Page, name: string): Promise<void> {
  await page.getByRole('link', { name: 'Sallow Reach' }).first().click();
  await step(page, 'Options').click();
  await page.getByRole('button', { name: 'Add an option' }).click();
  await page.getByLabel('Name of the option').fill(name);
  await page.getByRole('button', { name: 'Add it' }).click();
  await expect(page.getByRole('heading', { name: `Works in ${name}` })).toBeVisible();
  await expect(page.locator('[data-painted="true"]')).toBeVisible();
}

/** By the bar of the map's scale. */
async function pixelsPerMetre(page: Page): Promise<number> {
  const bar = page.getByRole('img', { name: /^This bar is \d+ m long$/ });
  const metres = Number(/\d+/.exec((await bar.getAttribute('aria-label'))!)![0]);
  return (Number(await bar.getAttribute('width')) - 40) / metres;
}

/** The painted map alone, as bytes that change with it. */
const picture = async (page: Page): Promise<string> =>
  (await page.locator('[data-painted] canvas').first().screenshot()).toString('base64');

const status = (page: Page): Locator => page.getByRole('region', { name: 'Quick look' });

test('a plan is drawn by mouse, looked at, suggested for, saved and run', async ({ page }) => {
  await signIn(page, demoPeople.manager);
  await addOption(page, 'Drawn by mouse');
  await expect(status(page).getByText('half')).toBeVisible();
  const bare = await picture(page);

  await test.step('plant a block, fenced, with mounds scattered', async () => {
    await tool(page, 'Planting: clumped').check();
    for (const [x, y] of [
      [0.03, 0.4],
      [0.2, 0.4],
      [0.2, 0.7],
    ])
      await pressSite(page, x, y);
    await pressSite(page, 0.03, 0.7, true);
    await page.getByRole('button', { name: /^Place \d+ clumps/ }).click();
    await expect(works(page, '200 clumps')).toBeVisible();

    await tool(page, 'fence').check();
    for (const [x, y] of [
      [0.05, 0.45],
      [0.15, 0.45],
      [0.15, 0.65],
      [0.05, 0.45],
    ])
      await pressSite(page, x, y);
    await expect(works(page, '1 fence')).toBeVisible();

    await tool(page, 'Mounds: scattered').check();
    await page.getByLabel('Number of mounds', { exact: true }).fill('12');
    await expect(page.getByRole('button', { name: 'Place 12 mounds' })).toBeVisible();
    // A tool is not left at the cost of what it shows.
    await tool(page, 'select').check();
    await expect(page.getByText('Still shown faint; not placed yet.')).toBeVisible();
    await expect(works(page, '12 mounds')).toBeHidden();
    await page.getByRole('button', { name: 'Place 12 mounds' }).click();
    await expect(works(page, '12 mounds')).toBeVisible();
  });

  await test.step('the quick look has recoloured the map', async () => {
    await expect(
      status(page)
        .getByText(/y before Wait/)
        .first(),
    ).toBeVisible();
    await expect.poll(() => picture(page)).not.toBe(bare);
  });

  await test.step('move one, copy it, delete the copy and take that back', async () => {
    await tool(page, 'Mounds: one by one').check();
    await pressSite(page, 0.5, 0.5);
    await expect(works(page, '13 mounds')).toBeVisible();
    const selected = page.getByRole('region', { name: 'What is selected' });
    const before = await selected.textContent();
    const box = await siteBox(page);
    await page.mouse.move(box.x + box.width * 0.5, box.y + box.height * 0.5);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width * 0.47, box.y + box.height * 0.45, { steps: 4 });
    await page.mouse.up();
    await expect.poll(() => selected.textContent()).not.toBe(before);
    await selected.getByRole('button', { name: 'Copy' }).click();
    await expect(works(page, '14 mounds')).toBeVisible();
    await selected.getByRole('button', { name: 'Remove' }).click();
    await expect(works(page, '13 mounds')).toBeVisible();
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(works(page, '14 mounds')).toBeVisible();
    await page.getByRole('button', { name: 'Redo' }).click();
  });

  await test.step('water is refused on the spot, with the reason', async () => {
    await pressSite(page, 0.64, 0.85);
    const note = page.getByRole('alert').filter({ hasText: /Not here\..*cannot grow there/ });
    await expectOnMap(page, note);
    await expectPassable(note);
    await expect(works(page, '13 mounds')).toBeVisible();
  });

  await test.step('suggest, cancel, suggest again and accept', async () => {
    const suggest = page.getByRole('region', { name: 'Suggest' });
    // So many that it is still at work when it is cancelled.
    await suggest.getByLabel('Number of mounds to suggest').fill('400');
    await suggest.getByRole('button', { name: 'Suggest', exact: true }).click();
    await suggest.getByRole('button', { name: 'Cancel' }).press('Enter');
    await expect(suggest.getByRole('progressbar')).toBeHidden();
    await expect(suggest.getByText(/bring growth forward by/)).toBeHidden();
    await suggest.getByLabel('Number of mounds to suggest').fill('3');
    await suggest.getByRole('button', { name: 'Suggest', exact: true }).click();
    await expect(suggest.getByText(/bring growth forward by/)).toBeVisible();
    await suggest.getByRole('button', { name: 'Add them here' }).click();
    await expect(works(page, '16 mounds')).toBeVisible();
  });

  await test.step('save, reload and run', async () => {
    await page.getByRole('button', { name: 'Save', exact: true }).click();
    await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
    await page.reload();
    await expect(works(page, '16 mounds')).toBeVisible();
    await page.getByRole('link', { name: 'Set up a run' }).click();
    await page.getByRole('button', { name: 'Start the run' }).click();
    await expect(page).toHaveURL(/\/runs\/[\w-]+/);
    await expect(page.getByText(/[1-9]\d* of 35 years stored/)).toBeVisible();
  });
});

test('five mounds are placed 6 m apart without closing anything in between', async ({ page }) => {
  await signIn(page, demoPeople.manager);
  await addOption(page, 'Five in a row');
  const box = (await map(page).boundingBox())!;
  const step = 6 * (await pixelsPerMetre(page));
  for (let i = 0; i < 5; i++) await page.mouse.click(box.x + box.width * 0.3 + i * step, box.y + 250);
  await expect(works(page, '5 mounds')).toBeVisible();
  // What was placed last is told in the margin.
  await expect(page.getByRole('region', { name: 'What is selected' })).toContainText('Mound 5');

  await test.step('map, meters, list and save bar are in view together', async () => {
    for (const part of [
      map(page),
      page.getByText('Expected closing'),
      page.getByRole('heading', { name: 'Options', exact: true }),
      page.getByRole('button', { name: 'Save', exact: true }),
    ])
      await expect(part).toBeInViewport({ ratio: 1 });
  });
});

test('a plan is drawn by keys alone', async ({ page }) => {
  await signIn(page, demoPeople.modeller);
  await addOption(page, 'Drawn by keys');
  const keys = async (...names: string[]) => {
    for (const name of names) await page.keyboard.press(name);
  };
  const again = (name: string, times: number) => Array<string>(times).fill(name);
  // The keyboard goes to the map of an option that was just added.
  await expect(map(page)).toBeFocused();

  await keys('f', 'ArrowLeft', ...again('ArrowLeft', 6), 'Space', ...again('ArrowLeft', 4), 'Space');
  await keys(...again('ArrowUp', 4), 'Space', 'Backspace', 'Space', 'Enter');
  await expect(works(page, '1 fence')).toBeVisible();

  await keys('m', ...again('ArrowRight', 3), 'Space');
  await expect(works(page, '1 mound')).toBeVisible();
  const selected = page.getByRole('region', { name: 'What is selected' });
  await keys('s');
  const before = await selected.textContent();
  await keys('ArrowRight', 'ArrowUp');
  await expect.poll(() => selected.textContent()).not.toBe(before);
  await keys('Control+d');
  await expect(works(page, '2 mounds')).toBeVisible();
  await keys('Delete');
  await expect(works(page, '1 mound')).toBeVisible();
  await keys('Control+z');
  await expect(works(page, '2 mounds')).toBeVisible();

  // Pushed north until the site ends.
  await keys('n', ...again('Shift+ArrowUp', 30));
  await expect(page.getByText(/Not here\..*off the site/)).toBeVisible();

  // Escape drops what a pattern shows, Enter places it.
  await keys('t');
  await expect(page.getByRole('button', { name: 'Place 40 mounds' })).toBeVisible();
  await keys('Escape');
  await expect(page.getByRole('button', { name: 'Place 40 mounds' })).toBeHidden();
  await keys('t');
  await expect(page.getByRole('button', { name: 'Place 40 mounds' })).toBeEnabled();
  await keys('Enter');
  await expect(works(page, '42 mounds')).toBeVisible();
  await page.getByRole('button', { name: 'Save', exact: true }).press('Enter');
  await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
});
