import { AsyncLocalStorage } from 'node:async_hooks';
import type { DataSource, EntityManager } from 'typeorm';

/**
 * Runs `work` in a transaction of its own, after all writes that were asked for before it. It commits when `work`
 * resolves and rolls back when it rejects. Everything that `work` reads or writes goes through the manager it is given.
 */
export type Write = <T>(work: (manager: EntityManager) => Promise<T>) => Promise<T>;

/**
 * The one queue for writes. SQLite has one connection here: transactions that overlap on it would nest, and the rollback
 * of one would undo another that has already reported success.
 */
export function createWriteQueue(writer: DataSource): Write {
  const inside = new AsyncLocalStorage<true>();
  let last: Promise<unknown> = Promise.resolve();
  return (work) => {
    if (inside.getStore())
      return Promise.reject(
        new Error(
          'write() was called inside write(): it would wait for itself. Pass the manager on instead.',
        ),
      );
    const result = last.then(() => inside.run(true, () => writer.transaction(work)));
    last = result.catch(() => undefined);
    return result;
  };
}
