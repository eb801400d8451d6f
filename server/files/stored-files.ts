import type { Services } from '../services.ts';
import { unreferencedHashes } from '../database/blob-references.ts';
import type { Manager } from '../database/manager.ts';
import type { ReceivedFile } from './blob-store.ts';

type Keeper = Pick<Services, 'write' | 'blobs'>;

/**
 * Keeps arrivals and writes the rows that refer to them in one turn of the write queue, so that nobody can release a
 * blob between its arrival and its row. When the rows are refused nothing of the files is left.
 */
export async function storeWithRows<T>(
  services: Keeper,
  files: readonly ReceivedFile[],
  rows: (manager: Manager) => Promise<T>,
): Promise<T> {
  try {
    return await services.write(async (manager) => {
      for (const file of files) await services.blobs.keep(file);
      return rows(manager);
    });
  } catch (error) {
    await releaseBlobs(
      services,
      files.map((file) => file.hash),
    );
    throw error;
  } finally {
    for (const file of files) await services.blobs.discard(file);
  }
}

/** Deletes those of the blobs that no row refers to any more. Call it after the rows are gone. */
export function releaseBlobs(services: Keeper, hashes: Iterable<string>): Promise<void> {
  return services.write(async (manager) => {
    for (const hash of await unreferencedHashes(manager, hashes)) await services.blobs.delete(hash);
  });
}

/** Deletes every blob without a row: what a process left behind that was killed between the two. For the start. */
export async function sweepBlobs(services: Keeper): Promise<void> {
  await releaseBlobs(services, await services.blobs.hashes());
}
