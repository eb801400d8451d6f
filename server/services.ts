import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { pino, type Logger } from 'pino';
import type { Config } from './config.ts';
import { openDatabase, type Database } from './database/open-database.ts';
import { createScopeLookup } from './database/scope-lookup.ts';
import { openBlobStore, type BlobStore } from './files/blob-store.ts';
import { sweepBlobs } from './files/stored-files.ts';
import { createBackground, type Background } from './jobs/background.ts';
import { createRasterPool, type RasterPool } from './jobs/raster-pool.ts';
import { createMail, type Mail } from './mail/mail.ts';
import type { ScopeLookup } from './middleware/access.ts';
import { createPasswords, type Passwords } from './people/passwords.ts';
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
  passwords: Passwords;
  mail: Mail;
  scope: ScopeLookup;
  /** uploaded and computed files, by the SHA-256 of their bytes */
  blobs: BlobStore;
  /** heavy work on rasters, off the thread that answers requests */
  rasters: RasterPool;
  /** long work that no request waits for, with a worker of its own, so that exports do not queue behind it */
  background: Background;
  backgroundRasters: RasterPool;
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
  const blobs = await openBlobStore(config.dataDir);
  const rasters = createRasterPool();
  const background = createBackground(log);
  const backgroundRasters = createRasterPool();
  await sweepBlobs({ write, blobs });
  const mail = createMail({ config, write, clock, log });
  return {
    config,
    log,
    clock,
    dataSource,
    write,
    sessionSecret: config.sessionSecret ?? keptSessionSecret(config.dataDir),
    passwords: createPasswords(config.bcryptCost),
    mail,
    scope: createScopeLookup(dataSource),
    blobs,
    rasters,
    background,
    backgroundRasters,
    async close() {
      await background.close();
      await backgroundRasters.close();
      await mail.idle();
      await rasters.close();
      await database.close();
    },
  };
}
