import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** A raster with its part on a site. A replaced one keeps its row for the runs that used it. */
export interface LayerRow {
  id: string;
  siteId: string;
  part: string;
  fileName: string;
  /** SHA-256 of the file as uploaded, the name of its blob */
  hash: string;
  bytes: number;
  /** SHA-256 of the blob with the decoded values */
  valuesHash: string;
  valuesBytes: number;
  /** JSON: what was found in the raster */
  facts: string;
  unit: string;
  /** JSON: the class table, null until it is set */
  classes: string | null;
  uploadedAt: string;
  uploadedBy: string;
  /** null while this is the site's layer of its part */
  replacedAt: string | null;
}

export const LayerEntity = new EntitySchema<LayerRow>({
  name: 'Layer',
  tableName: 'layer',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    part: { type: 'text' },
    fileName: { type: 'text' },
    hash: { type: 'text' },
    bytes: { type: 'integer' },
    valuesHash: { type: 'text' },
    valuesBytes: { type: 'integer' },
    facts: { type: 'text' },
    unit: { type: 'text' },
    classes: { type: 'text', nullable: true },
    uploadedAt: { type: 'text' },
    uploadedBy: { type: 'text' },
    replacedAt: { type: 'text', nullable: true },
  },
  indices: [
    { name: 'layer_by_site', columns: ['siteId'] },
    { name: 'layer_by_hash', columns: ['hash'] },
    { name: 'layer_current', columns: ['siteId', 'part'], unique: true, where: '"replacedAt" IS NULL' },
    { name: 'layer_by_values', columns: ['valuesHash'] },
  ],
  foreignKeys: [
    {
      name: 'layer_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
