import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';
import { TeamEntity } from './team.ts';

/** A raster file on its way to become a layer. */
export interface UploadRow {
  id: string;
  teamId: string;
  /** null while a site is yet to be made from it */
  siteId: string | null;
  fileName: string;
  /** SHA-256 of the file, the name of its blob */
  hash: string;
  bytes: number;
  /** as in the contract, but for `waiting`, which is what `reading` and `aligning` are until they begin */
  state: string;
  /** how often its present work has begun: what breaks the server each time is not begun for ever */
  attempts: number;
  /** `when-asked`, `when-clear` (by itself when nothing has to be decided) or `always` (put back from the history) */
  place: string;
  /** the layer of the history that it is made from; null for a fresh file */
  putBackOf: string | null;
  /** JSON of the contract's schemas, null until known */
  description: string | null;
  facts: string | null;
  /** the band, from 1, that `facts` and the thumbnail are about */
  band: number | null;
  /** blob of the small picture */
  thumbnailHash: string | null;
  choices: string;
  /** JSON: why it was refused, or failed */
  problem: string | null;
  layerId: string | null;
  uploadedAt: string;
  uploadedBy: string;
}

export const UploadEntity = new EntitySchema<UploadRow>({
  name: 'Upload',
  tableName: 'upload',
  columns: {
    id: { type: 'text', primary: true },
    teamId: { type: 'text' },
    siteId: { type: 'text', nullable: true },
    fileName: { type: 'text' },
    hash: { type: 'text' },
    bytes: { type: 'integer' },
    state: { type: 'text' },
    attempts: { type: 'integer' },
    place: { type: 'text' },
    putBackOf: { type: 'text', nullable: true },
    description: { type: 'text', nullable: true },
    facts: { type: 'text', nullable: true },
    band: { type: 'integer', nullable: true },
    thumbnailHash: { type: 'text', nullable: true },
    choices: { type: 'text' },
    problem: { type: 'text', nullable: true },
    layerId: { type: 'text', nullable: true },
    uploadedAt: { type: 'text' },
    uploadedBy: { type: 'text' },
  },
  indices: [
    { name: 'upload_by_team', columns: ['teamId', 'siteId', 'uploadedAt'] },
    { name: 'upload_by_site', columns: ['siteId'] },
    { name: 'upload_by_hash', columns: ['hash'] },
    { name: 'upload_by_thumbnail', columns: ['thumbnailHash'] },
  ],
  foreignKeys: [
    {
      name: 'upload_team',
      target: TeamEntity,
      columnNames: ['teamId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
    {
      name: 'upload_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
