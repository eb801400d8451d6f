import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** A raster with its part on a site. One that was replaced or taken off keeps its row, as the part's history. */
export interface LayerRow {
  id: string;
  siteId: string;
  part: string;
  /** of a resurvey; 0 of any other part, so that a part is played once a year at most */
  year: number;
  /** JSON: the grid that it lies on, the site's while it stands */
  grid: string;
  /** SHA-256 of the raster on that grid, the name of its blob and what runs name */
  hash: string;
  bytes: number;
  /** SHA-256 of the blob with the decoded values */
  valuesHash: string;
  valuesBytes: number;
  fileName: string;
  /** SHA-256 of the file as uploaded, the name of its blob; `hash` where nothing had to be changed */
  sourceHash: string;
  sourceBytes: number;
  /** JSON: what the file is, band and CRS */
  source: string;
  /** JSON: what was done to bring the file onto the grid */
  alignment: string;
  note: string;
  /** JSON: what was found in the raster */
  facts: string;
  unit: string;
  /** JSON: unit and datum of heights, for `elevation` */
  vertical: string | null;
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
    year: { type: 'integer', default: 0 },
    grid: { type: 'text' },
    hash: { type: 'text' },
    bytes: { type: 'integer' },
    valuesHash: { type: 'text' },
    valuesBytes: { type: 'integer' },
    fileName: { type: 'text' },
    sourceHash: { type: 'text' },
    sourceBytes: { type: 'integer' },
    source: { type: 'text' },
    alignment: { type: 'text' },
    note: { type: 'text' },
    facts: { type: 'text' },
    unit: { type: 'text' },
    vertical: { type: 'text', nullable: true },
    classes: { type: 'text', nullable: true },
    uploadedAt: { type: 'text' },
    uploadedBy: { type: 'text' },
    replacedAt: { type: 'text', nullable: true },
  },
  indices: [
    { name: 'layer_by_site', columns: ['siteId'] },
    { name: 'layer_by_hash', columns: ['hash'] },
    {
      name: 'layer_current',
      columns: ['siteId', 'part', 'year'],
      unique: true,
      where: '"replacedAt" IS NULL',
    },
    { name: 'layer_by_values', columns: ['valuesHash'] },
    { name: 'layer_by_source', columns: ['sourceHash'] },
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
