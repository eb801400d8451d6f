import AxeBuilder from '@axe-core/playwright';
import { demoAddresses } from './addresses.ts';
import { pagesOf } from './all-pages.ts';
import { demoPeople } from './people.ts';
import { expect, signIn, test } from './test.ts';

for (const [width, theme] of [
  [1440, 'light'],
  [390, 'dark'],
] as const)
  test(`every page is accessible and fits at ${width} wide, ${theme}`, async ({ page }) => {
    await page.setViewportSize({ width, height: width > 500 ? 900 : 844 });
    await page.emulateMedia({ colorScheme: theme });
    const check = async (name: string, path: string) => {
      await page.goto(path);
      await expect(page.locator('h1, h2').first()).toBeVisible();
      await expect(page.locator('[aria-busy=true]')).toHaveCount(0);
      const { violations } = await new AxeBuilder({ page }).analyze();
      expect(
        violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => String(target)).join(' | ')}`),
        name,
      ).toEqual([]);
      const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      expect(overflow, `${name} scrolls sideways`).toBeLessThanOrEqual(0);
      const upright = await page.evaluate(verticalScroll);
      expect(upright.areas.length, `${name} scrolls in ${upright.areas.join(', ')}`).toBeLessThanOrEqual(1);
      // Where the whole fits the window, nothing may stretch the page: not even words for the ear alone.
      if (width > 500 && upright.fitsWindow)
        expect(upright.pageHeight, `${name} scrolls into a blank`).toBe(upright.windowHeight);
    };
    await check('sign-in', '/sign-in');
    await check('forgot', '/forgot');
    await signIn(page, demoPeople.admin);
    for (const [name, path] of Object.entries(pagesOf(await demoAddresses(page)))) await check(name, path);
  });

/** What of a page scrolls up and down, the page itself included; runs in the browser. */
function verticalScroll() {
  const { scrollHeight, clientHeight } = document.documentElement;
  const scrolls = (element: Element) =>
    /auto|scroll/.test(getComputedStyle(element).overflowY) &&
    element.scrollHeight > element.clientHeight + 1;
  const areas = [...document.body.querySelectorAll('*')]
    .filter((element) => element.tagName !== 'TEXTAREA' && scrolls(element))
    .map((element) => `${element.tagName.toLowerCase()} “${element.textContent.trim().slice(0, 24)}”`);
  if (scrollHeight > clientHeight) areas.unshift('the page');
  return {
    areas,
    pageHeight: scrollHeight,
    windowHeight: clientHeight,
    /** a map, or a sheet beside its margin: such a page is as high as the window */
    fitsWindow: document.querySelector('main aside[aria-label^="Notes"]') !== null,
  };
}
