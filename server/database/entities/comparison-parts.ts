import { EntitySchema } from 'typeorm';
import { ComparisonEntity } from './comparison.ts';

const ofComparison = (name: string) => ({
  name,
  target: ComparisonEntity,
  columnNames: ['comparisonId'],
  referencedColumnNames: ['id'],
  onDelete: 'CASCADE' as const,
});

/** Place of an ensemble in the plan of its comparison. */
export interface EnsembleAddress {
  comparisonId: string;
  option: number;
  outlook: number;
}

/** What is kept of one replicate; `record` is JSON of the contract's schema. */
export interface ReplicateRow extends EnsembleAddress {
  replicate: number;
  digest: string;
  record: string;
}
export const ReplicateEntity = new EntitySchema<ReplicateRow>({
  name: 'Replicate',
  tableName: 'replicate',
  columns: {
    comparisonId: { type: 'text', primary: true },
    option: { type: 'integer', primary: true },
    outlook: { type: 'integer', primary: true },
    replicate: { type: 'integer', primary: true },
    digest: { type: 'text' },
    record: { type: 'text' },
  },
  foreignKeys: [ofComparison('replicate_comparison')],
});

/** A map of an ensemble, or the counts behind its maps (`state`). */
export interface EnsembleMapRow extends EnsembleAddress {
  map: string;
  /** SHA-256 of the blob */
  hash: string;
  bytes: number;
  /** replicates that it shows */
  replicates: number;
}
export const EnsembleMapEntity = new EntitySchema<EnsembleMapRow>({
  name: 'EnsembleMap',
  tableName: 'ensemble_map',
  columns: {
    comparisonId: { type: 'text', primary: true },
    option: { type: 'integer', primary: true },
    outlook: { type: 'integer', primary: true },
    map: { type: 'text', primary: true },
    hash: { type: 'text' },
    bytes: { type: 'integer' },
    replicates: { type: 'integer' },
  },
  indices: [{ name: 'ensemble_map_by_hash', columns: ['hash'] }],
  foreignKeys: [ofComparison('ensemble_map_comparison')],
});

/** A raster that a comparison stands on: it is kept for as long as the comparison is. */
export interface ComparisonLayerRow {
  comparisonId: string;
  hash: string;
}
export const ComparisonLayerEntity = new EntitySchema<ComparisonLayerRow>({
  name: 'ComparisonLayer',
  tableName: 'comparison_layer',
  columns: {
    comparisonId: { type: 'text', primary: true },
    hash: { type: 'text', primary: true },
  },
  indices: [{ name: 'comparison_layer_by_hash', columns: ['hash'] }],
  foreignKeys: [ofComparison('comparison_layer_comparison')],
});

/** What happened to a comparison, in the order of `place`. */
export interface ComparisonEventRow {
  comparisonId: string;
  place: number;
  at: string;
  by: string;
  what: string;
}
export const ComparisonEventEntity = new EntitySchema<ComparisonEventRow>({
  name: 'ComparisonEvent',
  tableName: 'comparison_event',
  columns: {
    comparisonId: { type: 'text', primary: true },
    place: { type: 'integer', primary: true },
    at: { type: 'text' },
    by: { type: 'text' },
    what: { type: 'text' },
  },
  foreignKeys: [ofComparison('comparison_event_comparison')],
});

/** A run of a study of what matters; `run` is JSON of the contract's schema. */
export interface StudyRunRow extends EnsembleAddress {
  /** SHA-256 of all that decides the run */
  key: string;
  /** order in which it came, within its option and outlook */
  place: number;
  digest: string;
  run: string;
}
export const StudyRunEntity = new EntitySchema<StudyRunRow>({
  name: 'StudyRun',
  tableName: 'study_run',
  columns: {
    comparisonId: { type: 'text', primary: true },
    option: { type: 'integer', primary: true },
    outlook: { type: 'integer', primary: true },
    key: { type: 'text', primary: true },
    place: { type: 'integer' },
    digest: { type: 'text' },
    run: { type: 'text' },
  },
  foreignKeys: [ofComparison('study_run_comparison')],
});
