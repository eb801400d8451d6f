import { copyFileSync, cpSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import express from 'express';
import supertest from 'supertest';
import { createApp } from '#server/app.ts';
import { readConfig, type Config } from '#server/config.ts';
import { openDatabase } from '#server/database/open-database.ts';
import { resumeWork } from '#server/resume-work.ts';
import { createServices, type Services } from '#server/services.ts';
import { checkReplies } from './check-replies.ts';

const makeFolder = () => mkdtempSync(join(tmpdir(), 'foothold-test-'));

/** An empty, migrated database, made once in each test process and copied for each server. */
let template: Promise<string> | undefined;
async function makeTemplate(): Promise<string> {
  const folder = makeFolder();
  process.on('exit', () => rmSync(folder, { recursive: true, force: true }));
  const file = join(folder, 'foothold.sqlite');
  // Closing the last connection folds the write-ahead log into the file, so the file alone is the database.
  await (await openDatabase(file)).close();
  return file;
}

export interface TestServer {
  services: Services;
  app: ReturnType<typeof createApp>;
  /** a client without cookies */
  request: ReturnType<typeof supertest>;
  /** a client that keeps its cookies, as a browser does */
  agent(): ReturnType<typeof supertest.agent>;
  /** moves the server's clock on */
  pass(milliseconds: number): void;
  close(): Promise<void>;
  /** closes, and leaves the data folder to the caller: `testServer({}, folder)` starts on a copy of it */
  freeze(): Promise<string>;
}

/**
 * The real app on a real SQLite file in a folder of its own; every reply is held to the API's description. Close it when
 * the test is done.
 * @param frozen a data folder to start on a copy of; an empty database unless given
 */
export async function testServer(changes: Partial<Config> = {}, frozen?: string): Promise<TestServer> {
  const dataDir = makeFolder();
  if (frozen) cpSync(frozen, dataDir, { recursive: true });
  else copyFileSync(await (template ??= makeTemplate()), join(dataDir, 'foothold.sqlite'));
  const config: Config = {
    ...readConfig({}),
    dataDir,
    demo: 'off',
    logLevel: 'silent',
    sessionSecret: 'a secret that is only good for tests',
    bcryptCost: 4,
    attempts: { windowMs: 60_000, perAddress: 100_000, perAccount: 100_000 },
    ...changes,
  };
  let passed = 0;
  const services = await createServices(config, () => new Date(Date.now() + passed));
  await resumeWork(services);
  const app = express();
  app.use(checkReplies(services));
  app.use(createApp(services));
  return {
    services,
    app,
    request: supertest(app),
    agent: () => supertest.agent(app),
    pass: (milliseconds) => {
      passed += milliseconds;
    },
    async close() {
      await services.close();
      rmSync(dataDir, { recursive: true, force: true });
    },
    async freeze() {
      await services.close();
      return dataDir;
    },
  };
}
