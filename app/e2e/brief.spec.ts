import { readFileSync } from 'node:fs';
import type { Page } from '@playwright/test';
import { pdfText } from './pdf-text.ts';
import { demoAddresses } from './addresses.ts';
import { demoPeople } from './people.ts';
import { expect, signIn, test } from './test.ts';

const button = (page: Page, name: string | RegExp) => page.getByRole('button', { name });

async function downloadPdf(page: Page): Promise<Buffer> {
  const [file] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: /^PDF of version/ }).click(),
  ]);
  return readFileSync(await file.path());
}

test('a manager makes a brief of a comparison, writes it, takes it as PDF and sends it', async ({ page }) => {
  await signIn(page, demoPeople.manager);
  const { siteId } = await demoAddresses(page);
  const headings = () => page.getByRole('article', { name: 'The page' }).getByRole('heading', { level: 2 });

  await test.step('make it: its words follow from the figures', async () => {
    await page.goto(`/sites/${siteId}/brief`);
    await expect(page.getByLabel('Of the comparison')).toContainText('Wait, mounds or clumps');
    await button(page, 'Make a brief').click();
    await expect(page).toHaveURL(/\/briefs\/[0-9a-f-]{36}$/);
    await expect(
      page.getByText(/^In \d+ of 100 futures .* closes the ground before the next drought/),
    ).toBeVisible();
    await expect(page.getByRole('img', { name: /^Map of / })).toHaveCount(4);
    await expect(headings().first()).toHaveText('The question');
  });

  await test.step('write a title and a part, and move it, by the keyboard', async () => {
    await button(page, 'Write the title').press('Enter');
    await page.getByLabel('Title').fill('Mounds at Sallow Reach, for the board');
    await page.getByLabel('Title').press('Enter');
    await button(page, 'Write The question').press('Enter');
    await page.getByLabel('Words').fill('Shall the board pay for mounds?\n- this year\n- or never');
    await page.getByLabel('Words').press('Escape');
    await button(page, 'Move The question down').press('Enter');
    await expect(headings().first()).toHaveText('The answer');
    await expect(page.getByText('Kept in this browser until saved.')).toBeVisible();
  });

  await test.step('a reload loses nothing, and saving makes a version', async () => {
    await page.reload();
    await expect(page.getByText('Shall the board pay for mounds?')).toBeVisible();
    await button(page, 'Save as version 2').click();
    await expect(page.getByRole('heading', { name: 'Version 2', exact: true })).toBeVisible();
    await page.getByRole('link', { name: 'Version 1', exact: true }).click();
    await expect(page.getByText('Shall the board pay for mounds?')).toHaveCount(0);
    await expect(page.getByText('It never changes.')).toBeVisible();
    await page.getByRole('link', { name: 'Go to the newest' }).click();
    await expect(page.getByText('Shall the board pay for mounds?')).toBeVisible();
  });

  await test.step('its PDF says the same', async () => {
    const pdf = await downloadPdf(page);
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
    const pages = pdfText(pdf);
    // Without poppler-utils its text cannot be read here; the server's tests say so.
    if (!pages) return;
    const [first, ...annex] = pages;
    expect(first).toContain('Mounds at Sallow Reach, for the board');
    expect(first.indexOf('The answer')).toBeLessThan(first.indexOf('Shall the board pay for mounds?'));
    expect(annex.join(' ')).toContain('ODD protocol');
  });

  await test.step('send it; a wrong address is named before anything goes out', async () => {
    await button(page, 'Send version 2').click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('To').fill('board at people');
    await dialog.getByRole('button', { name: /^Send/ }).click();
    await expect(dialog.getByText(/“board” is no e-mail address/)).toBeVisible();
    await dialog.getByLabel('To').fill('board@people.example');
    await dialog.getByRole('button', { name: /^\+ / }).first().click();
    await dialog.getByRole('button', { name: 'Send to 2 people' }).dblclick();
    await expect(dialog).toHaveCount(0);
    const list = page.getByRole('region', { name: 'Who has it' });
    await expect(list.getByText('in the local outbox')).toHaveCount(2);
    await expect(list.getByRole('listitem')).toHaveCount(1);
    await expect(list.getByText('board@people.example')).toBeVisible();
    await page.reload();
    await expect(list.getByText('board@people.example')).toBeVisible();
  });

  await test.step('what was sent is kept', async () => {
    await button(page, 'Delete it').click();
    await button(page, 'Delete the brief').click();
    await expect(page.getByText(/This brief was sent, so it is kept/)).toBeVisible();
    await button(page, 'Keep it').click();
  });
});
