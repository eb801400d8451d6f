import { EntitySchema } from 'typeorm';
import { TeamEntity } from './team.ts';

/** A place with one working grid. `plant`, `outlook` and their like are JSON of the contract's schemas, parsed when read. */
export interface SiteRow {
  id: string;
  teamId: string;
  name: string;
  /** marks the demo's place, which does not exist */
  invented: boolean;
  width: number;
  height: number;
  cellSize: number;
  originX: number;
  originY: number;
  epsg: number;
  crsName: string;
  /** JSON: the grid that the site was made with; null while it still has it */
  finestGrid: string | null;
  /** JSON: what elevation does, and the levels of the tide beside it; null until they are set */
  elevationCurves: string | null;
  tidalDatums: string | null;
  plant: string;
  /** false while the plant is the default that nobody has looked at */
  plantSet: boolean;
  /** JSON: the profile that the plant was taken from; null: typed in on the site */
  plantOrigin: string | null;
  outlook: string;
  outlookSet: boolean;
  /** JSON: further outlooks with their ids; null while there are none */
  otherOutlooks: string | null;
  createdAt: string;
}

export const SiteEntity = new EntitySchema<SiteRow>({
  name: 'Site',
  tableName: 'site',
  columns: {
    id: { type: 'text', primary: true },
    teamId: { type: 'text' },
    name: { type: 'text' },
    invented: { type: 'boolean' },
    width: { type: 'integer' },
    height: { type: 'integer' },
    cellSize: { type: 'real' },
    originX: { type: 'real' },
    originY: { type: 'real' },
    epsg: { type: 'integer' },
    crsName: { type: 'text' },
    finestGrid: { type: 'text', nullable: true },
    elevationCurves: { type: 'text', nullable: true },
    tidalDatums: { type: 'text', nullable: true },
    plant: { type: 'text' },
    plantSet: { type: 'boolean' },
    plantOrigin: { type: 'text', nullable: true },
    outlook: { type: 'text' },
    outlookSet: { type: 'boolean' },
    otherOutlooks: { type: 'text', nullable: true },
    createdAt: { type: 'text' },
  },
  indices: [{ name: 'site_by_team', columns: ['teamId'] }],
  foreignKeys: [
    {
      name: 'site_team',
      target: TeamEntity,
      columnNames: ['teamId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
