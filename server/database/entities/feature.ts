import { EntitySchema } from 'typeorm';
import { FeatureImportEntity } from './feature-import.ts';

/** A surveyed point or area on a site, in the site's CRS. */
export interface FeatureRow {
  id: string;
  siteId: string;
  importId: string;
  /** row or feature of the file, from 1; several features may come from one */
  row: number;
  kind: string;
  name: string;
  /** JSON: a disc or a polygon */
  shape: string;
  strength: number;
  halo: number;
}

export const FeatureEntity = new EntitySchema<FeatureRow>({
  name: 'Feature',
  tableName: 'feature',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    importId: { type: 'text' },
    row: { type: 'integer' },
    kind: { type: 'text' },
    name: { type: 'text' },
    shape: { type: 'text' },
    strength: { type: 'real' },
    halo: { type: 'real' },
  },
  indices: [
    { name: 'feature_by_site', columns: ['siteId'] },
    { name: 'feature_by_import', columns: ['importId'] },
  ],
  foreignKeys: [
    {
      // An import goes with its site, and its features with it.
      name: 'feature_of_import',
      target: FeatureImportEntity,
      columnNames: ['importId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
