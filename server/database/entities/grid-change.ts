import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** A change of a site's working grid that is under way or has failed; it is gone once the site has taken it. */
export interface GridChangeRow {
  siteId: string;
  /** tells one change from the next of the same site */
  id: string;
  /** JSON: the grid to come */
  grid: string;
  /** `aligning` or `failed` */
  state: string;
  attempts: number;
  problem: string | null;
  askedAt: string;
  askedBy: string;
}

export const GridChangeEntity = new EntitySchema<GridChangeRow>({
  name: 'GridChange',
  tableName: 'grid_change',
  columns: {
    siteId: { type: 'text', primary: true },
    id: { type: 'text' },
    grid: { type: 'text' },
    state: { type: 'text' },
    attempts: { type: 'integer' },
    problem: { type: 'text', nullable: true },
    askedAt: { type: 'text' },
    askedBy: { type: 'text' },
  },
  foreignKeys: [
    {
      name: 'grid_change_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
