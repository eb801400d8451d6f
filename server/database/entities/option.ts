import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** Works on the ground of a site. `works` and `sets` are JSON of the contract's schemas, parsed when read. */
export interface OptionRow {
  id: string;
  siteId: string;
  /** the option that does nothing: every site has exactly one, and it cannot be changed */
  wait: boolean;
  /** ascending in the list; need not be without gaps */
  place: number;
  name: string;
  note: string;
  archived: boolean;
  works: string;
  sets: string;
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
    place: { type: 'integer', default: 0 },
    name: { type: 'text' },
    note: { type: 'text', default: '' },
    archived: { type: 'boolean', default: false },
    works: { type: 'text' },
    sets: { type: 'text', default: '[]' },
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
