// A comparison in the browser, from its start to its last saved map, beside the engine alone on the very same runs.
import { availableParallelism, loadavg } from 'node:os';
import { chromium, type Page } from '@playwright/test';
import { getComparison } from '#contract/comparisons.ts';
import { fillPath } from '#contract/endpoint.ts';
import { getSession } from '#contract/people.ts';
import { buildGround } from '#sim-core/grid/build-ground.ts';
import { printLine } from '#sim-core/bench/line.ts';
import { engineAlone } from './engine-alone.ts';
import { largeSite, optionsBesideWait, side, years } from './large-site.ts';
import { account, startProduct } from './product.ts';
import { watchPage } from './watch-page.ts';

/** `--full` runs as many futures as the target names. */
const replicates = process.argv.includes('--full') ? 200 : 40;
const runs = replicates * (1 + optionsBesideWait);
/** Futures of each option that the engine alone is measured on, half before the browser's turn and half after it. */
const measured = Math.min(replicates, 16);

const product = await startProduct();
const browser = await chromium.launch({
  // `.config/bench.mjs` finds it
  executablePath: process.env.CHROMIUM_PATH ?? '',
  args: ['--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking'],
});
try {
  const page = await browser.newPage({ baseURL: product.address, locale: 'en-GB' });
  const watch = await watchPage(browser, page);
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(account.email);
  await page.getByLabel('Password').fill(account.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('**/');
  const session = getSession.reply.parse(await (await page.request.get(getSession.path)).json());
  const { siteId, site, cover } = await largeSite(page.request, session.memberships[0].teamId);
  await page.goto(`/sites/${siteId}/compare`);
  await page.getByLabel('Futures of each option').fill(String(replicates));
  await page.getByRole('button', { name: 'Start the comparison' }).waitFor();

  const begun = { clock: performance.now(), processor: await watch.processorSeconds() };
  await page.getByRole('button', { name: 'Start the comparison' }).click();
  await page.waitForURL(/\/compare\/[\w-]+$/);
  const comparisonId = new URL(page.url()).pathname.split('/').pop()!;
  const early = await atWork(page, watch.memory);
  await page.getByText(`finished, ${replicates} of ${replicates} futures`).waitFor({ timeout: 3_600_000 });
  const [clock, processor] = [
    (performance.now() - begun.clock) / 1000,
    (await watch.processorSeconds()) - begun.processor,
  ];
  const [memory, waits] = [await watch.memory(), await watch.waits()];

  const path = fillPath(getComparison.path, { siteId, comparisonId });
  const comparison = getComparison.reply.parse(await (await page.request.get(path)).json());
  await page.close();
  const habitat = { values: new Uint8Array(side * side).fill(1), noData: null };
  const coverHash = site.layers.find(({ part }) => part === 'cover')!.hash;
  const ground = buildGround(comparison.plan.common.layers, site.grid, (source) =>
    'layer' in source && source.layer === coverHash ? { values: cover, noData: null } : habitat,
  );
  // What comes first warms the engine up.
  engineAlone(comparison, ground, [0]);
  const alone = engineAlone(
    comparison,
    ground,
    Array.from({ length: measured }, (_, i) => Math.floor((i * replicates) / measured)),
  );
  const predicted = (alone.seconds / alone.runs) * runs;

  const common = { mode: 'counts', map: 'invented', size: `${side}×${side}`, load: loadavg()[0] } as const;
  const work = runs * years;
  const line = (against: string, seconds: number, ratio: number) =>
    printLine({ ...common, name: 'comparison', against, work, seconds, rate: work / seconds, ratio });
  line('engine', processor, predicted / processor);
  line('engine-clock', clock, predicted / availableParallelism() / clock);
  const figure = (name: 'waiting' | 'page-memory', against: string, rate: number, target: number) =>
    printLine({ ...common, name, against, work, seconds: clock, rate, ratio: target / rate });
  figure('waiting', 'press-200-ms', waits.press, 200);
  figure('waiting', 'task-200-ms', waits.task, 200);
  figure('page-memory', 'at-20-%', memory, early);
} finally {
  await browser.close();
  await product.stop();
}

/** Uses the page while it works, as somebody would; returns its memory when a fifth of the runs is done. */
async function atWork(page: Page, memory: () => Promise<number>): Promise<number> {
  const progress = page.getByText(/^run \d+ of \d+/).first();
  const slider = page.getByRole('slider', { name: 'Year that the maps show' });
  let early = 0;
  await progress.waitFor();
  for (;;) {
    const done = Number(
      /\d+/.exec((await progress.textContent({ timeout: 2000 }).catch(() => '')) ?? '')?.[0],
    );
    if (Number.isNaN(done)) return early || memory();
    if (!early && done >= runs / 5) early = await memory();
    await slider.press('ArrowRight').catch(() => undefined);
    await page.waitForTimeout(700);
  }
}
