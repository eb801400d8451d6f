import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';

const root = resolve(import.meta.dirname, '../..');
export const account = { email: 'bench@measured.example', password: 'bench of one evening' };

/** The built product on an empty data folder and a port of its own, without the demo. */
export async function startProduct(): Promise<{ address: string; stop: () => Promise<void> }> {
  const port = 20_000 + (process.pid % 10_000);
  const dataDir = mkdtempSync(join(tmpdir(), 'foothold-bench-'));
  const child = spawn(process.execPath, ['.config/start.mjs'], {
    cwd: root,
    stdio: ['ignore', 'ignore', 'inherit'],
    env: {
      ...process.env,
      PORT: String(port),
      DATA_DIR: dataDir,
      DEMO: 'off',
      LOG_LEVEL: 'warn',
      ADMIN_EMAIL: account.email,
      ADMIN_PASSWORD: account.password,
    },
  });
  const ended = new Promise<void>((done) => child.once('exit', () => done()));
  const stop = async () => {
    child.kill('SIGTERM');
    await ended;
    rmSync(dataDir, { recursive: true, force: true });
  };
  const address = `http://localhost:${port}`;
  for (let tries = 0; tries < 600 && child.exitCode === null; tries++) {
    const answer = await fetch(`${address}/api/health`).catch(() => undefined);
    if (answer?.ok) return { address, stop };
    await new Promise((go) => setTimeout(go, 500));
  }
  await stop();
  throw new Error('The product did not start; the lines above say why.');
}
