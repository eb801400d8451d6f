import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import express from 'express';
import supertest from 'supertest';
import { afterAll, expect, it } from 'vitest';
import { clientPages } from './client-pages.ts';

// In a dot folder, as the build is.
const above = mkdtempSync(join(tmpdir(), 'foothold-client-'));
const folder = join(above, '.build/app');
mkdirSync(join(folder, 'assets'), { recursive: true });
writeFileSync(join(folder, 'index.html'), '<title>Foothold</title>');
writeFileSync(join(folder, 'assets/main-abc.js'), 'export {};');
writeFileSync(join(folder, 'icon.svg'), '<svg/>');
afterAll(() => rmSync(above, { recursive: true, force: true }));

const client = supertest(express().use(clientPages(folder)));

it('serves the page at every address of the client, asked for anew each time', async () => {
  for (const path of ['/', '/sites/1/runs', '/invite/abc']) {
    const reply = await client.get(path).expect(200);
    expect(reply.text).toContain('Foothold');
    expect(reply.headers['cache-control']).toBe('no-cache');
  }
});

it('serves assets for good', async () => {
  const reply = await client.get('/assets/main-abc.js').expect(200);
  expect(reply.headers['cache-control']).toBe('public, max-age=31536000, immutable');
});

it('does not pass the page off as an asset that is missing', async () => {
  await client.get('/assets/main-old.js').expect(404);
});

it('serves no page while there is no build', async () => {
  await supertest(express().use(clientPages(join(folder, 'none'))))
    .get('/')
    .expect(404);
});
