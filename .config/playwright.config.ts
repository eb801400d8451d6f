import { spawnSync } from 'node:child_process';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { defineConfig } from '@playwright/test';

const root = resolve(import.meta.dirname, '..');
// A port of this run's own, so that a server left by another run is not in the way; workers inherit it.
const port = Number((process.env.E2E_PORT ??= String(20_000 + (process.pid % 10_000))));
const chromium =
  process.env.CHROMIUM_PATH ??
  spawnSync('sh', ['-c', 'command -v chromium || command -v chromium-browser'], {
    encoding: 'utf8',
  }).stdout.trim();
// Workers load this file again: the folder is made once and handed on.
const dataDir = (process.env.E2E_DATA_DIR ??= mkdtempSync(join(tmpdir(), 'foothold-e2e-')));

export default defineConfig({
  testDir: join(root, 'app/e2e'),
  outputDir: join(root, '.build/browser'),
  reporter: process.env.PLAYWRIGHT_JSON_OUTPUT_FILE ? [['list'], ['json']] : 'list',
  workers: 1,
  // The camera runs by `npm run screenshots` alone.
  ...(process.env.SCREENSHOTS ? { grep: /@screenshots/ } : { grepInvert: /@screenshots/ }),
  timeout: 180_000,
  expect: { timeout: 30_000 },
  use: {
    baseURL: `http://localhost:${port}`,
    viewport: { width: 1440, height: 900 },
    locale: 'en-GB',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: chromium,
      args: [
        '--no-sandbox',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  // The product as its users start it, on an empty data folder.
  webServer: {
    command: 'node .config/start.mjs',
    cwd: root,
    url: `http://localhost:${port}/api/health`,
    // The demo's comparison is computed first.
    timeout: 300_000,
    env: { PORT: String(port), DATA_DIR: dataDir, LOG_LEVEL: 'warn' },
    stdout: 'ignore',
    stderr: 'pipe',
  },
});
