import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { freePort, startServer } from './testing/started-server.ts';

const dataDir = mkdtempSync(join(tmpdir(), 'foothold-main-'));
afterAll(() => rmSync(dataDir, { recursive: true, force: true }));

describe('the server', () => {
  it('starts, says how to get in, answers, and ends on SIGTERM; the next start has a new link', async () => {
    const port = String(await freePort());
    const links: string[] = [];
    for (let i = 0; i < 2; i++) {
      const { child, said, ended } = startServer(dataDir, { PORT: port });
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
    const { ended, output } = startServer(dataDir, { PORT: 'eighty' });
    expect(await ended).toBe(1);
    expect(output()).toBe('Foothold cannot start.\nPORT: found "eighty", expected a port from 0 to 65535.\n');
  });
});
