import { join } from 'node:path';
import { demoAddresses } from './addresses.ts';
import { pagesOf } from './all-pages.ts';
import { demoPeople } from './people.ts';
import { signIn, test } from './test.ts';

// Not a check but a camera: `npm run screenshots` lets it run, `npm test` leaves it out.
const folder = join(import.meta.dirname, '../../.build/screenshots');

for (const theme of ['light', 'dark'] as const)
  for (const width of [1440, 390])
    test(`every page at ${width} wide, ${theme}`, { tag: '@screenshots' }, async ({ page }) => {
      await page.setViewportSize({ width, height: width > 500 ? 900 : 844 });
      await page.emulateMedia({ colorScheme: theme });
      const take = async (name: string, path: string) => {
        await page.goto(path);
        await page.locator('h1, h2').first().waitFor();
        // Maps paint when Pixi is there, charts when their data is.
        await page.waitForFunction(() =>
          [...document.querySelectorAll('[data-painted]')].every(
            (map) => map.getAttribute('data-painted') === 'true',
          ),
        );
        await page.waitForTimeout(1500);
        await page.screenshot({ path: join(folder, `${name}-${width}-${theme}.png`) });
      };
      await page.goto('/sign-in');
      await page.waitForTimeout(6000);
      await page.screenshot({ path: join(folder, `sign-in-${width}-${theme}.png`) });
      await signIn(page, demoPeople.admin);
      for (const [name, path] of Object.entries(pagesOf(await demoAddresses(page)))) await take(name, path);
    });
