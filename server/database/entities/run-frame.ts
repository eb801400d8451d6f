import { EntitySchema } from 'typeorm';
import { RunEntity } from './run.ts';

/** The stored cover of one year of a run. */
export interface RunFrameRow {
  runId: string;
  year: number;
  /** SHA-256 of the blob, a cell-values binary */
  hash: string;
  bytes: number;
}

export const RunFrameEntity = new EntitySchema<RunFrameRow>({
  name: 'RunFrame',
  tableName: 'run_frame',
  columns: {
    runId: { type: 'text', primary: true },
    year: { type: 'integer', primary: true },
    hash: { type: 'text' },
    bytes: { type: 'integer' },
  },
  indices: [{ name: 'run_frame_by_hash', columns: ['hash'] }],
  foreignKeys: [
    {
      name: 'run_frame_run',
      target: RunEntity,
      columnNames: ['runId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
