import type { EntityManager } from 'typeorm';

/** What rows are read and written through: the transaction inside `write`, `dataSource.manager` for reading outside. */
export type Manager = EntityManager;
