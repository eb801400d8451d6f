import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** A drought record of a site as it was uploaded; `record` is JSON of `sim-core/spec/drought-record.ts`. */
export interface DroughtRecordRow {
  id: string;
  siteId: string;
  record: string;
  fileName: string;
  uploadedAt: string;
  uploadedBy: string;
  /** null for the one that the site uses */
  replacedAt: string | null;
}

export const DroughtRecordEntity = new EntitySchema<DroughtRecordRow>({
  name: 'DroughtRecord',
  tableName: 'drought_record',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    record: { type: 'text' },
    fileName: { type: 'text' },
    uploadedAt: { type: 'text' },
    uploadedBy: { type: 'text' },
    replacedAt: { type: 'text', nullable: true },
  },
  indices: [{ name: 'drought_record_by_site', columns: ['siteId'] }],
  foreignKeys: [
    {
      name: 'drought_record_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
