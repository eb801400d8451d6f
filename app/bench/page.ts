import { loadavg } from 'node:os';
import { spawnSync } from 'node:child_process';
import { chromium, type Page } from '@playwright/test';
import { createQuickLook } from '#sim-core/plan/quick-look.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { printLine } from '#sim-core/bench/line.ts';
import { installProbe, type Probe } from './page-probe.ts';
import { servePage } from './page-server.ts';
import { benchGround, benchSite, firstTeam } from './page-site.ts';

/**
 * How long the drawing board takes to answer, in a browser: from the pointer that drags a mound to the frame with the map
 * coloured anew and the meter beside it, and from the quick look's start to its first map. The yardstick is the plain
 * solve of the same ground in Node in the same run, so `ratio` says what the page adds: 1 is nothing. By the clock.
 */
const moves = 40;
const chromiumPath =
  process.env.CHROMIUM_PATH ??
  spawnSync('sh', ['-c', 'command -v chromium || command -v chromium-browser'], {
    encoding: 'utf8',
  }).stdout.trim();

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1];
const readProbe = (page: Page) =>
  page.evaluate(() => (window as unknown as { benchProbe: Probe }).benchProbe);

/** Seconds to solve a site's ground from scratch, without any page; the fastest of three. */
function plainSolve(size: number): number {
  const { grid, classes, cover } = benchGround(size);
  const cells = size * size;
  const ground = {
    capacity: Uint8Array.from(classes, (value) => (value === 1 ? 0 : 255)),
    vigour: new Uint8Array(cells).fill(255),
    refuge: new Uint8Array(cells),
    cover,
  };
  let seconds = Infinity;
  for (let round = 0; round < 3; round++) {
    const start = performance.now();
    createQuickLook({ grid, ground, rates: defaultRates, stepsPerYear: 1, surveyYear: 2026, years: 30 });
    seconds = Math.min(seconds, (performance.now() - start) / 1000);
  }
  return seconds;
}

/** Seconds from the start of the quick look to its first map on the screen, and from each move to the map that shows it. */
async function timePage(page: Page, address: string, size: number) {
  // What compiles this file names functions by a helper that the page does not have.
  await page.addInitScript('globalThis.__name = (of) => of');
  await page.addInitScript(installProbe, size);
  await page.goto(address);
  await page.getByText('half', { exact: true }).waitFor();
  await page.waitForFunction(
    () => (window as unknown as { benchProbe: Probe }).benchProbe.answered.length > 0,
  );
  await page.waitForTimeout(2000);
  const first = await readProbe(page);
  // What was painted before its first answer is the cover at the survey.
  const told = first.notes.find(({ what }) => what === 'message')!.at;
  const opened = (first.answered.find((at) => at > told)! - first.opened!) / 1000;

  const box = (await page.getByRole('application').boundingBox())!;
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.getByRole('radio', { name: 'select', exact: true }).check();
  await page.mouse.move(x, y);
  await page.mouse.down();
  const answers: number[] = [];
  let notes: Probe['notes'] = [];
  for (let i = 1; i <= moves; i++) {
    const before = await page.evaluate(() => {
      const probe = (window as unknown as { benchProbe: Probe }).benchProbe;
      probe.moved = undefined;
      probe.notes = [];
      probe.answered = [];
      return performance.now();
    });
    await page.mouse.move(x + 8 + i, y);
    await page.waitForFunction(
      () => (window as unknown as { benchProbe: Probe }).benchProbe.answered.length > 0,
      undefined,
      { polling: 20 },
    );
    const probe = await readProbe(page);
    answers.push((probe.answered[0] - (probe.moved ?? before)) / 1000);
    notes = probe.notes.map(({ what, at }) => ({ what, at: at - (probe.moved ?? before) }));
  }
  await page.mouse.up();
  if (process.argv.includes('--notes'))
    console.log(
      notes.map(({ what, at }) => `${what} ${at.toFixed(0)}`).join(', '),
      answers.map((a) => Math.round(a * 1000)).join(' '),
    );
  return { opened, answers };
}

const cases = [
  { size: 1000, map: 'move-one' },
  { size: 2000, map: 'full-solve' },
] as const;

if (chromiumPath === '')
  for (const { size, map } of cases)
    printLine({
      ...{ name: 'page', mode: 'quick-look', map, size, against: 'plain-solve' },
      ...{ work: size * size, seconds: 0, rate: 0, ratio: null, reason: 'there is no Chromium' },
    });
else {
  const server = await servePage();
  const browser = await chromium.launch({
    executablePath: chromiumPath,
    args: ['--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking'],
  });
  try {
    const context = await browser.newContext({
      baseURL: server.url,
      viewport: { width: 1440, height: 900 },
    });
    const teamId = await firstTeam(context.request, server.token);
    for (const { size, map } of cases) {
      const address = await benchSite(context.request, teamId, size);
      const page = await context.newPage();
      const plain = plainSolve(size);
      const { opened, answers } = await timePage(page, address, size);
      await page.close();
      const seconds = map === 'move-one' ? median(answers) : opened;
      printLine({
        ...{ name: 'page', mode: 'quick-look', map, size, against: 'plain-solve' },
        ...{ work: size * size, seconds, rate: (size * size) / seconds },
        ...{ ratio: plain / seconds, load: loadavg()[0] },
      });
    }
  } finally {
    await browser.close();
    await server.stop();
  }
}
