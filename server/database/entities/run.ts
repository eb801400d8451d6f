import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';
import { OptionEntity } from './option.ts';

/** One simulated future. `spec`, `grid`, `result` and `check` are JSON of the contract's schemas, parsed when read. */
export interface RunRow {
  id: string;
  siteId: string;
  /** null once the option is deleted; `optionName` stays */
  optionId: string | null;
  optionName: string;
  name: string;
  status: string;
  spec: string;
  /** the site's grid as it was when the run started */
  grid: string;
  crsName: string;
  seed: string;
  mode: string;
  surveyYear: number;
  years: number;
  result: string | null;
  recoveredYear: number | null;
  lostYear: number | null;
  digest: string | null;
  closingHash: string | null;
  closingBytes: number | null;
  startedAt: string;
  startedBy: string;
  check: string | null;
  /** JSON: where belief outran data when it was started */
  cautions: string;
  /** JSON: outlook and plant by name; null for runs from before this was kept */
  origins: string | null;
}

export const RunEntity = new EntitySchema<RunRow>({
  name: 'Run',
  tableName: 'run',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    optionId: { type: 'text', nullable: true },
    optionName: { type: 'text' },
    name: { type: 'text' },
    status: { type: 'text' },
    spec: { type: 'text' },
    grid: { type: 'text' },
    crsName: { type: 'text' },
    seed: { type: 'text' },
    mode: { type: 'text' },
    surveyYear: { type: 'integer' },
    years: { type: 'integer' },
    result: { type: 'text', nullable: true },
    recoveredYear: { type: 'real', nullable: true },
    lostYear: { type: 'integer', nullable: true },
    digest: { type: 'text', nullable: true },
    closingHash: { type: 'text', nullable: true },
    closingBytes: { type: 'integer', nullable: true },
    startedAt: { type: 'text' },
    startedBy: { type: 'text' },
    check: { type: 'text', nullable: true },
    cautions: { type: 'text', default: '[]' },
    origins: { type: 'text', nullable: true },
  },
  indices: [
    { name: 'run_by_site', columns: ['siteId', 'startedAt'] },
    { name: 'run_by_option', columns: ['optionId'] },
    { name: 'run_by_closing', columns: ['closingHash'] },
  ],
  foreignKeys: [
    {
      name: 'run_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
    {
      name: 'run_option',
      target: OptionEntity,
      columnNames: ['optionId'],
      referencedColumnNames: ['id'],
      onDelete: 'SET NULL',
    },
  ],
});
