import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** Works on the ground of a site. `works` is JSON of the contract's schema, parsed when read. */
export interface OptionRow {
  id: string;
  siteId: string;
  /** the option that does nothing: every site has exactly one, and it cannot be changed */
  wait: boolean;
  name: string;
  works: string;
  /** rises with each change */
  revision: number;
  createdAt: string;
  changedAt: string;
  changedBy: string;
}

export const OptionEntity = new EntitySchema<OptionRow>({
  name: 'Option',
  tableName: 'option',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    wait: { type: 'boolean' },
    name: { type: 'text' },
    works: { type: 'text' },
    revision: { type: 'integer' },
    createdAt: { type: 'text' },
    changedAt: { type: 'text' },
    changedBy: { type: 'text' },
  },
  indices: [
    { name: 'option_by_site', columns: ['siteId'] },
    { name: 'option_wait', columns: ['siteId'], unique: true, where: '"wait" = 1' },
  ],
  foreignKeys: [
    {
      name: 'option_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
