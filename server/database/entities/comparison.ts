import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** Ensembles of several options under the same luck. `plan`, `grid` and `decision` are JSON of the contract's schemas. */
export interface ComparisonRow {
  id: string;
  siteId: string;
  name: string;
  status: string;
  ending: string | null;
  plan: string;
  /** replicates that are wanted of each ensemble; the plan's number until it is resumed with more */
  replicates: number;
  /** the site's grid as it was when the comparison began */
  grid: string;
  crsName: string;
  decision: string | null;
  startedAt: string;
  startedBy: string;
  /** JSON: where belief outran data when it was started */
  cautions: string;
}

export const ComparisonEntity = new EntitySchema<ComparisonRow>({
  name: 'Comparison',
  tableName: 'comparison',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    name: { type: 'text' },
    status: { type: 'text' },
    ending: { type: 'text', nullable: true },
    plan: { type: 'text' },
    replicates: { type: 'integer' },
    grid: { type: 'text' },
    crsName: { type: 'text' },
    decision: { type: 'text', nullable: true },
    startedAt: { type: 'text' },
    startedBy: { type: 'text' },
    cautions: { type: 'text', default: '[]' },
  },
  indices: [{ name: 'comparison_by_site', columns: ['siteId', 'startedAt'] }],
  foreignKeys: [
    {
      name: 'comparison_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
