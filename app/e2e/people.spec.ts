import { demoPeople } from './people.ts';
import { expect, signIn, test } from './test.ts';

test('an admin invites somebody, who reads the letter, joins, and forgets the password', async ({
  page,
  browser,
}) => {
  await signIn(page, demoPeople.admin);
  await page.getByRole('navigation').getByRole('link', { name: 'Northmarsh Restoration Trust' }).click();
  await page.getByLabel('E-mail').fill('new.hand@northmarsh.example');
  await page.getByRole('button', { name: /invite/i }).click();
  await expect(page.getByText('new.hand@northmarsh.example').first()).toBeVisible();
  await page.getByRole('button', { name: /^Read/ }).first().click();
  await expect(page.getByRole('dialog')).toContainText(/https?:\/\/\S+\/invite\/[\w-]+/);
  const letter = await page.getByRole('dialog').innerText();
  const link = /https?:\/\/\S+\/invite\/[\w-]+/.exec(letter)?.[0];

  const visitor = await (await browser.newContext()).newPage();
  await visitor.goto(new URL(link!).pathname);
  await visitor.getByLabel(/name/i).fill('New Hand');
  await visitor.getByLabel(/password/i).fill('a long enough one');
  await visitor.getByRole('button', { name: /join/i }).click();
  await expect(visitor).toHaveURL('/');
  await expect(visitor.getByText('Sallow Reach').first()).toBeVisible();
  await visitor.getByRole('button', { name: 'New Hand' }).click();
  await visitor.getByRole('menuitem', { name: 'Sign out' }).click();
  await expect(visitor).toHaveURL(/sign-in/);
  await visitor.goto('/account');
  await expect(visitor).toHaveURL(/sign-in\?to=%2Faccount/);
  await visitor.goto(new URL(link!).pathname);
  await expect(visitor.getByText(/used|no longer|run out/i).first()).toBeVisible();
});

test('a trainer replays and may not change a site', async ({ page }) => {
  await signIn(page, demoPeople.trainer);
  await expect(page.getByRole('link', { name: 'New site' })).toHaveCount(0);
  await page.getByRole('link', { name: 'Sallow Reach' }).first().click();
  await expect(page.getByRole('button', { name: 'Save the class table' })).toHaveCount(0);
  await page.getByRole('navigation').getByRole('link', { name: /^Runs/ }).click();
  await expect(page.getByRole('button', { name: 'Start the run' })).toHaveCount(0);
  await page
    .getByRole('link', { name: /40 mounds, scattered/ })
    .first()
    .click();
  // The demo's runs were made by the server in Node: the browser must come to the same digest.
  await page.getByRole('button', { name: 'Run again and compare the digest' }).click();
  await expect(page.getByText('The digest agrees.')).toBeVisible({ timeout: 90_000 });
});
