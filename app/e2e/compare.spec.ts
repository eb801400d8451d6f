import { readFile } from 'node:fs/promises';
import type { Locator, Page } from '@playwright/test';
import { decide, getComparison, getReplicates } from '#contract/comparisons.ts';
import { fillPath } from '#contract/endpoint.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { demoAddresses } from './addresses.ts';
import { demoPeople } from './people.ts';
import { smallSite } from './small-site.ts';
import { expect, signIn, test } from './test.ts';

const futures = 24;
const button = (page: Page, name: string | RegExp) => page.getByRole('button', { name });

/** Lets so many saved pieces through and holds the next one until told, so that the work stands in its middle. */
async function holdPieces(page: Page) {
  let open = Infinity;
  let waiting: (() => void)[] = [];
  let heard = () => undefined as void;
  await page.route('**/ensembles/*/*/replicates', async (route) => {
    if (route.request().method() === 'PUT' && open-- <= 0) {
      heard();
      await new Promise<void>((go) => waiting.push(go));
    }
    // The page may be gone meanwhile.
    await route.continue().catch(() => undefined);
  });
  return {
    /** @returns what comes when a piece is held */
    after: (pieces: number) => {
      open = pieces;
      return new Promise<void>((resolve) => (heard = resolve));
    },
    /** What is held stays so, what follows goes through. */
    open: () => (open = Infinity),
    release: () => {
      open = Infinity;
      for (const go of waiting) go();
      waiting = [];
    },
  };
}

test('a manager compares two options, comes back to it in the middle, and decides', async ({
  page,
  browser,
}) => {
  await signIn(page, demoPeople.manager);
  const { teamId } = await demoAddresses(page);
  const modeller = await (await browser.newContext({ locale: 'en-GB' })).newPage();
  await signIn(modeller, demoPeople.modeller);
  const siteId = await smallSite(modeller, teamId, 'Compared Marsh');
  const pieces = await holdPieces(page);
  let comparisonId = '';
  const stored = async (): Promise<ReplicateRecord[][]> =>
    Promise.all(
      [0, 1].map(async (option) => {
        const path = fillPath(getReplicates.path, { siteId, comparisonId, option, outlook: 0 });
        return getReplicates.reply.parse(await (await page.request.get(path)).json()).replicates;
      }),
    );
  const count = (records: ReplicateRecord[][]) => records[0].length + records[1].length;
  const standing = (words: string | RegExp): Locator =>
    page.getByRole('main').getByText(words, { exact: typeof words === 'string' });

  await test.step('start it; what cannot be is said', async () => {
    await page.goto(`/sites/${siteId}/compare`);
    await expect(page.getByText('No comparisons yet.')).toBeVisible();
    await page.getByLabel('Futures of each option').fill('1');
    await expect(
      page.getByText('Found “1” futures; a whole number from 2 to 2000 is expected.'),
    ).toBeVisible();
    await expect(button(page, 'Start the comparison')).toBeDisabled();
    await page.getByLabel('Futures of each option').fill(String(futures));
    await page.getByLabel('Name of the comparison').fill('Wait or clumps');
    const held = pieces.after(2);
    await button(page, 'Start the comparison').click();
    await expect(page).toHaveURL(/\/compare\/[\w-]+$/);
    comparisonId = new URL(page.url()).pathname.split('/').pop()!;
    await held;
  });

  await test.step('estimates show while it works; pause, with what is done kept', async () => {
    await expect(page.getByText(/of 100 futures this closes before the next drought/).first()).toBeVisible();
    await expect(page.getByText(/run \d+ of 48/).first()).toBeVisible();
    await button(page, 'Pause').click();
    pieces.release();
    await expect(button(page, 'Go on from what is saved')).toBeVisible();
    await expect(standing(/^paused, \d+ of 24 futures$/)).toBeVisible();
  });

  await test.step('another tab goes on and is killed; what was acknowledged stays', async () => {
    const before = await stored();
    const other = await page.context().newPage();
    const held = (await holdPieces(other)).after(1);
    await other.goto(`/sites/${siteId}/compare/${comparisonId}`);
    await button(other, 'Go on from what is saved').click();
    await held;
    const acknowledged = await stored();
    expect(count(acknowledged)).toBeGreaterThan(count(before));
    const session = await page.context().newCDPSession(other);
    const crashed = other.waitForEvent('crash');
    session.send('Page.crash').catch(() => undefined);
    await crashed;
    await other.close();
    expect(await stored()).toEqual(acknowledged);
    await page.reload();
    await expect(standing(/^not at work in this tab, \d+ of 24 futures are saved$/)).toBeVisible();
  });
  const paused = await stored();
  expect(count(paused)).toBeGreaterThanOrEqual(16);
  expect(count(paused)).toBeLessThan(2 * futures);

  await test.step('go on, and load the page again in mid-ensemble', async () => {
    const held = pieces.after(0);
    await button(page, 'Go on from what is saved').click();
    await held;
    expect(count(await stored())).toBe(count(paused));
    await expect(button(page, 'Pause')).toBeVisible();
    pieces.open();
    page.on('dialog', (dialog) => void dialog.accept());
    await page.reload();
    pieces.release();
    await expect(standing('finished, 24 of 24 futures')).toBeVisible();
    const all = await stored();
    expect(all.map((records) => records.length)).toEqual([futures, futures]);
    for (const [option, records] of paused.entries())
      for (const record of records)
        expect(all[option].find(({ replicate }) => replicate === record.replicate)).toEqual(record);
  });

  await test.step('maps in each mode, by keyboard through the years, and swiped', async () => {
    const maps = page.getByRole('application');
    for (const [mode, words] of [
      ['chance to have closed', 'chance to have closed in 2036'],
      ['median closing year', 'median closing year'],
      ['cover against Wait', 'cover against Wait in 2036'],
      ['mean cover', 'mean cover in 2036'],
    ]) {
      await page.getByText(mode, { exact: true }).click();
      // Wait against itself would show nothing.
      const shown = mode === 'cover against Wait' ? 1 : 2;
      await expect(maps).toHaveCount(shown);
      await expect(page.getByRole('application', { name: `Clumps: ${words}` })).toBeVisible();
      await expect(page.locator('[data-painted=true]')).toHaveCount(shown);
    }
    const years = page.getByRole('slider', { name: 'Year that the maps show' });
    await years.press('ArrowRight');
    await expect(years).toHaveAttribute('aria-valuetext', /^2037; Wait .*; Clumps /);
    await years.press('End');
    await expect(page).toHaveURL(/year=2046/);
    await expect(page.getByRole('application', { name: 'Clumps: mean cover in 2046' })).toBeVisible();
    await button(page, 'Swipe Wait and Clumps').click();
    const share = page.getByRole('slider', { name: /^Share of the map that shows Wait/ });
    await share.press('ArrowRight');
    await expect(share).toHaveValue('51');
    await button(page, 'Side by side').click();
  });

  await test.step('one future alone comes to the digest that is recorded', async () => {
    const lines = page.getByRole('slider', { name: /^Futures of Clumps/ });
    await lines.press('ArrowRight');
    await expect(lines).toHaveAttribute('aria-valuetext', /^Future \d+: /);
    const words = (await lines.getAttribute('aria-valuetext'))!;
    await button(page, 'Run it alone and watch').click();
    await expect(page).toHaveURL(/\/runs\/[\w-]+/);
    await expect(button(page, 'Run again and compare the digest')).toBeVisible();
    await page.goto(`/sites/${siteId}/compare/${comparisonId}`);
    await lines.press('Home');
    await expect(lines).toHaveAttribute('aria-valuetext', words);
    await expect(page.getByText('it came to the digest of this future')).toBeVisible();
    await expect(page.getByRole('link', { name: 'Run alone' })).toBeVisible();
  });

  await test.step('a modeller reads it and may not decide', async () => {
    await modeller.goto(`/sites/${siteId}/compare/${comparisonId}`);
    await expect(modeller.getByText('Managers and admins of the team decide.')).toBeVisible();
    await expect(button(modeller, 'Record decision')).toHaveCount(0);
    const asked = getComparison.reply.parse(
      await (await modeller.request.get(fillPath(getComparison.path, { siteId, comparisonId }))).json(),
    );
    const refused = await modeller.request.post(fillPath(decide.path, { siteId, comparisonId }), {
      data: { optionId: asked.plan.options[1].optionId, reason: 'I would.' },
    });
    expect(refused.status()).toBe(403);
    await modeller.context().close();
  });

  await test.step('the manager decides; it is frozen, and a copy goes on', async () => {
    const box = page.getByRole('region', { name: 'Decision' });
    await expect(button(page, 'Record decision')).toBeDisabled();
    await box.getByRole('radio', { name: 'Clumps' }).check();
    await box.getByLabel('Reason').fill('It closes before the next drought more often.');
    await box.getByLabel('Reservations, if any').fill('Survey again before planting.');
    await button(page, 'Record decision').click();
    await expect(box.getByText(/Ines Marlow, .*The comparison is frozen; a copy may go on\./)).toBeVisible();
    await expect(box.getByText('Survey again before planting.')).toBeVisible();
    await expect(standing('decided: Clumps')).toBeVisible();
    await expect(button(page, /^Run on to/)).toHaveCount(0);
    await expect(page.getByRole('heading', { name: 'Clumps chosen' })).toBeVisible();
    await button(page, 'Text and figures of this decision').click();
    const files = page.getByRole('dialog', { name: 'Text and figures' });
    await expect(files.getByText(/Decided: Clumps/)).toBeVisible();
    const download = page.waitForEvent('download');
    await button(page, 'Answers').click();
    const text = await readFile(await (await download).path(), 'utf8');
    expect(text.split('\r\n').map((line) => line.split(',').slice(1, 4))).toEqual([
      ['option', 'chosen', 'futures'],
      ['Wait', 'no', '24'],
      ['Clumps', 'yes', '24'],
      [],
    ]);
    await files.getByRole('button', { name: 'Close' }).click();
    await button(page, 'More').click();
    await expect(page.getByRole('menuitem', { name: 'Delete (decided: it stays)' })).toBeDisabled();
    await page.getByRole('menuitem', { name: 'Rename' }).click();
    await page.getByLabel('Name of the comparison').fill('Board paper');
    await button(page, 'Rename it').click();
    await expect(page.getByRole('heading', { name: 'Board paper', exact: true })).toBeVisible();
    await button(page, 'Go on in a copy').click();
    await expect(page.getByRole('heading', { name: 'Board paper, copy' })).toBeVisible();
    await expect(standing('a copy, not gone on with, 24 of 24 futures')).toBeVisible();
    await button(page, 'Run on to 48 futures').click();
    await expect(standing('finished, 48 of 48 futures')).toBeVisible();
    const first = await stored();
    comparisonId = new URL(page.url()).pathname.split('/').pop()!;
    const more = await stored();
    expect(more.map((records) => records.length)).toEqual([48, 48]);
    expect(more.map((records) => records.slice(0, futures))).toEqual(first);
  });

  await test.step('the copy is deleted from the list, with a question first', async () => {
    await page.goto(`/sites/${siteId}/compare`);
    await button(page, 'More for Board paper, copy').click();
    await page.getByRole('menuitem', { name: 'Delete' }).click();
    const ask = page.getByRole('alertdialog', { name: 'Delete Board paper, copy?' });
    await expect(ask.getByText(/48 futures of each option and its maps go for good/)).toBeVisible();
    await ask.getByRole('button', { name: 'Delete the comparison' }).click();
    // Behind the open question no link counts as there.
    await expect(page.getByRole('link', { name: 'Board paper', exact: true })).toBeVisible();
    await expect(page.getByRole('link', { name: 'Board paper, copy' })).toHaveCount(0);
  });
});
