import { EntitySchema } from 'typeorm';

export interface Team {
  id: string;
  name: string;
  createdAt: string;
}

export const TeamEntity = new EntitySchema<Team>({
  name: 'Team',
  tableName: 'team',
  columns: {
    id: { type: 'text', primary: true },
    name: { type: 'text' },
    createdAt: { type: 'text' },
  },
});
