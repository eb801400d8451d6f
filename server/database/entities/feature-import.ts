import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** A file that features of a site came with. */
export interface FeatureImportRow {
  id: string;
  siteId: string;
  fileName: string;
  /** SHA-256 of the file, the name of its blob */
  hash: string;
  /** what its coordinates were in */
  crsName: string;
  /** `shared` or `centre`: what cells on the edge of its features get; `centre` for files that came before there was a choice */
  edges: string;
  importedAt: string;
  importedBy: string;
}

export const FeatureImportEntity = new EntitySchema<FeatureImportRow>({
  name: 'FeatureImport',
  tableName: 'feature_import',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    fileName: { type: 'text' },
    hash: { type: 'text' },
    crsName: { type: 'text' },
    edges: { type: 'text', default: 'centre' },
    importedAt: { type: 'text' },
    importedBy: { type: 'text' },
  },
  indices: [
    { name: 'feature_import_by_site', columns: ['siteId'] },
    { name: 'feature_import_by_hash', columns: ['hash'] },
  ],
  foreignKeys: [
    {
      name: 'feature_import_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
