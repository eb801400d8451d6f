import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { projectRoot } from './project.ts';

const dataDir = mkdtempSync(join(tmpdir(), 'foothold-main-'));
afterAll(() => rmSync(dataDir, { recursive: true, force: true }));

async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  await new Promise((resolve) => server.close(resolve));
  return port;
}

/** Starts the server as its users do; `said` resolves once its output holds a text, `ended` with its exit code. */
function start(environment: Record<string, string>) {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: projectRoot,
    env: { PATH: process.env.PATH, DATA_DIR: dataDir, DEMO: 'off', LOG_LEVEL: 'silent', ...environment },
  });
  let output = '';
  const waiting: { pattern: RegExp; found: (match: RegExpExecArray) => void }[] = [];
  const listen = (chunk: Buffer) => {
    output += chunk.toString();
    for (const { pattern, found } of waiting) {
      const match = pattern.exec(output);
      if (match) found(match);
    }
  };
  child.stdout.on('data', listen);
  child.stderr.on('data', listen);
  const ended = new Promise<number | null>((resolve) => child.on('close', resolve));
  const said = (pattern: RegExp) =>
    Promise.race([
      new Promise<RegExpExecArray>((found) => waiting.push({ pattern, found })),
      ended.then(() => Promise.reject(new Error(`The server ended early:\n${output}`))),
    ]);
  return { child, said, ended, output: () => output };
}

describe('the server', () => {
  it('starts, says how to get in, answers, and ends on SIGTERM; the next start has a new link', async () => {
    const port = String(await freePort());
    const links: string[] = [];
    for (let i = 0; i < 2; i++) {
      const { child, said, ended } = start({ PORT: port });
      const [, address, token] = await said(/(http:\/\/localhost:\d+)\/setup\/([\w-]{43})\n/);
      links.push(token);
      const health = await fetch(`http://127.0.0.1:${port}/api/health`);
      expect([health.status, address]).toEqual([200, `http://localhost:${port}`]);
      const setup = await Promise.all(
        links.map((link) => fetch(`http://127.0.0.1:${port}/api/setup/${link}`)),
      );
      // The latest link alone works.
      expect(setup.map((reply) => reply.status)).toEqual(i === 0 ? [200] : [410, 200]);
      child.kill('SIGTERM');
      expect(await ended).toBe(0);
    }
    expect(links[0]).not.toBe(links[1]);
    for (const file of ['foothold.sqlite', 'session-secret'])
      expect(statSync(join(dataDir, file)).mode & 0o077, file).toBe(0);
  });

  it('refuses a wrong setting by name, without a stack', async () => {
    const { ended, output } = start({ PORT: 'eighty' });
    expect(await ended).toBe(1);
    expect(output()).toBe('Foothold cannot start.\nPORT: found "eighty", expected a port from 0 to 65535.\n');
  });
});
