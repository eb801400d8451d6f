import { EntitySchema } from 'typeorm';
import { TeamEntity } from './team.ts';

/** A profile of a plant that a team keeps for its sites. */
export interface LibraryPlantRow {
  id: string;
  teamId: string;
  name: string;
  archived: boolean;
  createdAt: string;
}

/** One version of a profile; never changed. `plant` is JSON of the contract's schema. */
export interface PlantVersionRow {
  plantId: string;
  version: number;
  plant: string;
  note: string;
  savedAt: string;
  savedBy: string;
}

export const LibraryPlantEntity = new EntitySchema<LibraryPlantRow>({
  name: 'LibraryPlant',
  tableName: 'library_plant',
  columns: {
    id: { type: 'text', primary: true },
    teamId: { type: 'text' },
    name: { type: 'text' },
    archived: { type: 'boolean' },
    createdAt: { type: 'text' },
  },
  indices: [{ name: 'library_plant_by_team', columns: ['teamId'] }],
  foreignKeys: [
    {
      name: 'library_plant_team',
      target: TeamEntity,
      columnNames: ['teamId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});

export const PlantVersionEntity = new EntitySchema<PlantVersionRow>({
  name: 'PlantVersion',
  tableName: 'plant_version',
  columns: {
    plantId: { type: 'text', primary: true },
    version: { type: 'integer', primary: true },
    plant: { type: 'text' },
    note: { type: 'text' },
    savedAt: { type: 'text' },
    savedBy: { type: 'text' },
  },
  foreignKeys: [
    {
      name: 'plant_version_plant',
      target: LibraryPlantEntity,
      columnNames: ['plantId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
