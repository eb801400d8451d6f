import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** What works cost on a site. `costs` is JSON of the contract's schema, parsed when read. */
export interface SiteCostsRow {
  siteId: string;
  costs: string;
  changedAt: string;
  changedBy: string;
}

export const SiteCostsEntity = new EntitySchema<SiteCostsRow>({
  name: 'SiteCosts',
  tableName: 'site_costs',
  columns: {
    siteId: { type: 'text', primary: true },
    costs: { type: 'text' },
    changedAt: { type: 'text' },
    changedBy: { type: 'text' },
  },
  foreignKeys: [
    {
      name: 'site_costs_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
