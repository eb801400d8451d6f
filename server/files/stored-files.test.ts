import { Readable } from 'node:stream';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { addTeam } from '#server/people/people.repository.ts';
import { storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { storeWithRows, sweepBlobs } from './stored-files.ts';

let server: TestServer;
beforeEach(async () => {
  server = await testServer();
});
afterEach(() => server.close());

const arrive = (text: string) => server.services.blobs.receive(Readable.from([Buffer.from(text)]), 1000);

it('rows that are refused take their files with them, and roll back', async () => {
  const { services } = server;
  const file = await arrive('a frame');
  const refused = storeWithRows(services, [file], async (manager) => {
    await addTeam(manager, 'Never', services.clock());
    throw new Error('no such run');
  });
  await expect(refused).rejects.toThrow('no such run');
  expect(storedFiles(server)).toEqual({ arrivals: [], blobs: [] });
  expect(await services.dataSource.query('SELECT * FROM "team"')).toEqual([]);
});

it('a blob without a row, left by a process that was killed, is swept at the start', async () => {
  const { blobs } = server.services;
  const file = await arrive('orphan');
  await blobs.keep(file);
  expect(storedFiles(server).blobs).toEqual([file.hash]);
  await sweepBlobs(server.services);
  expect(storedFiles(server).blobs).toEqual([]);
});
