import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** The product as it is served, on an empty folder without the demo: where it answers, and the token that opens it. */
export async function servePage(): Promise<{ url: string; token: string; stop: () => Promise<void> }> {
  const root = join(import.meta.dirname, '../..');
  const data = mkdtempSync(join(tmpdir(), 'foothold-bench-page-'));
  const port = 30_000 + (process.pid % 10_000);
  const server = spawn(process.execPath, ['.config/start.mjs'], {
    cwd: root,
    env: { ...process.env, PORT: String(port), DATA_DIR: data, DEMO: 'off', LOG_LEVEL: 'warn' },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const token = await new Promise<string>((resolve, reject) => {
    let said = '';
    server.stdout.setEncoding('utf8').on('data', (words: string) => {
      said += words;
      const found = /\/set-?up\/(\S+)/.exec(said);
      if (found) resolve(found[1]);
    });
    server.once('exit', () => reject(new Error(`The server ended before it was ready:\n${said}`)));
  });
  return {
    url: `http://localhost:${port}`,
    token,
    async stop() {
      const ended = new Promise((resolve) => server.once('exit', resolve));
      server.kill('SIGTERM');
      await ended;
      rmSync(data, { recursive: true, force: true });
    },
  };
}
