import { test as base, expect, type Page } from '@playwright/test';
import { demoPassword } from './people.ts';

/** Software WebGL grumbles about its speed; that is a warning. An error, or a page that throws, fails the journey. */
export const test = base.extend<{ page: Page }>({
  page: async ({ page }, provide) => {
    const trouble: string[] = [];
    page.on('console', (message) => {
      // A refused request is shown to the person; the browser logs it too.
      if (message.type() === 'error' && !/Failed to load resource/.test(message.text()))
        trouble.push(message.text());
    });
    page.on('pageerror', (error) => trouble.push(error.message));
    await provide(page);
    expect(trouble, 'errors on the console').toEqual([]);
  },
});
export { expect };

export async function signIn(page: Page, email: string, password = demoPassword): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL('/');
}
