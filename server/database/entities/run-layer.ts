import { EntitySchema } from 'typeorm';
import { RunEntity } from './run.ts';

/** A raster that a run stands on: it is kept for as long as the run is, so that the run can be replayed. */
export interface RunLayerRow {
  runId: string;
  /** SHA-256 of the uploaded file */
  hash: string;
}

export const RunLayerEntity = new EntitySchema<RunLayerRow>({
  name: 'RunLayer',
  tableName: 'run_layer',
  columns: {
    runId: { type: 'text', primary: true },
    hash: { type: 'text', primary: true },
  },
  indices: [{ name: 'run_layer_by_hash', columns: ['hash'] }],
  foreignKeys: [
    {
      name: 'run_layer_run',
      target: RunEntity,
      columnNames: ['runId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
