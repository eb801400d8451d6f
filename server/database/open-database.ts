import { DataSource } from 'typeorm';
import { migrations } from './migrations/index.ts';
import { entities } from './schema.ts';
import { createWriteQueue, type Write } from './write-queue.ts';

export interface Database {
  /** for reading alone: sees what is committed, and SQLite refuses any write through it */
  dataSource: DataSource;
  /** the one way to write */
  write: Write;
  close(): Promise<void>;
}

interface Pragmas {
  pragma(source: string): unknown;
}

const connect = (file: string, prepare: (connection: Pragmas) => void) =>
  new DataSource({
    type: 'better-sqlite3',
    database: file,
    entities,
    migrations,
    // The schema changes by migrations alone: `synchronize` may drop what it does not know.
    synchronize: false,
    migrationsTransactionMode: 'each',
    enableWAL: true,
    prepareDatabase: prepare,
  }).initialize();

/** The connection that writes; on its own only for migrations and the schema test. */
export const openWriter = (file: string): Promise<DataSource> =>
  connect(file, (connection) => {
    // A run or a decision that was confirmed must survive a power cut.
    connection.pragma('synchronous = FULL');
  });

/**
 * Opens the SQLite file, makes it if need be and brings its tables up to date. Reading has a connection of its own, so
 * that no reader sees a transaction that may still be rolled back.
 */
export async function openDatabase(file: string): Promise<Database> {
  const writer = await openWriter(file);
  await writer.runMigrations();
  const dataSource = await connect(file, (connection) => {
    connection.pragma('query_only = ON');
  });
  const write = createWriteQueue(writer);
  return {
    dataSource,
    write,
    async close() {
      await write(() => Promise.resolve());
      await dataSource.destroy();
      await writer.destroy();
    },
  };
}
