import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { pino, type Logger } from 'pino';
import type { Config } from './config.ts';
import { openDatabase, type Database } from './database/open-database.ts';
import type { ScopeLookup } from './middleware/access.ts';
import { keptSessionSecret } from './session-secret.ts';

/** All that the routes of one app share. Nothing is global: tests build many apps side by side. */
export interface Services {
  config: Config;
  log: Logger;
  clock: () => Date;
  /** for reading alone */
  dataSource: Database['dataSource'];
  /** the one way to write */
  write: Database['write'];
  sessionSecret: string;
  scope: ScopeLookup;
  /** waits for work in the background, then closes the database */
  close(): Promise<void>;
}

/** Opens the data folder, making it if need be, and everything that works on it. */
export async function createServices(
  config: Config,
  clock: () => Date = () => new Date(),
): Promise<Services> {
  mkdirSync(config.dataDir, { recursive: true, mode: 0o700 });
  const log = pino({ level: config.logLevel });
  const database = await openDatabase(join(config.dataDir, 'foothold.sqlite'));
  const { dataSource, write } = database;
  return {
    config,
    log,
    clock,
    dataSource,
    write,
    sessionSecret: config.sessionSecret ?? keptSessionSecret(config.dataDir),
    scope: {
      teamOfSite: () => Promise.resolve(undefined),
      teamOfRun: () => Promise.resolve(undefined),
    },
    close: () => database.close(),
  };
}
