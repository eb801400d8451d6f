import { EntitySchema } from 'typeorm';

/** Somebody who can sign in. `email` is in lower case. */
export interface Person {
  id: string;
  email: string;
  name: string;
  passwordHash: string;
  createdAt: string;
}

export const PersonEntity = new EntitySchema<Person>({
  name: 'Person',
  tableName: 'person',
  columns: {
    id: { type: 'text', primary: true },
    email: { type: 'text' },
    name: { type: 'text' },
    passwordHash: { type: 'text' },
    createdAt: { type: 'text' },
  },
  uniques: [{ name: 'person_email', columns: ['email'] }],
});
