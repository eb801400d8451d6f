import { randomUUID } from 'node:crypto';
import type supertest from 'supertest';
import { roles, type Role } from '#contract/people.ts';
import { addMember, addPerson, addTeam } from '#server/people/people.repository.ts';
import type { TestServer } from './test-server.ts';

export const testPassword = 'a password for tests';
export type Agent = ReturnType<typeof supertest.agent>;

export interface TestPerson {
  id: string;
  email: string;
  name: string;
}

/** Somebody who can sign in with `testPassword`, in no team yet. */
export async function makePerson({ services }: TestServer, name = 'Somebody'): Promise<TestPerson> {
  const email = `${randomUUID()}@people.example`;
  const passwordHash = await services.passwords.hash(testPassword);
  const { id } = await services.write((manager) =>
    addPerson(manager, { email, name, passwordHash }, services.clock()),
  );
  return { id, email, name };
}

/** A client that is signed in as a person, through the front door. */
export async function signInAs(server: TestServer, { email }: TestPerson): Promise<Agent> {
  const agent = server.agent();
  await agent.post('/api/session').send({ email, password: testPassword }).expect(200);
  return agent;
}

export interface TestTeam {
  teamId: string;
  people: Record<Role, TestPerson>;
  /** a signed-in client for each role */
  agents: Record<Role, Agent>;
}

/** A team with one member of each role, each signed in. */
export async function makeTeam(server: TestServer, name = 'A team'): Promise<TestTeam> {
  const { write, clock } = server.services;
  const { id: teamId } = await write((manager) => addTeam(manager, name, clock()));
  const people: Partial<Record<Role, TestPerson>> = {};
  const agents: Partial<Record<Role, Agent>> = {};
  for (const role of roles) {
    const person = await makePerson(server, `${name}: ${role}`);
    await write((manager) => addMember(manager, teamId, person.id, role, clock()));
    people[role] = person;
    agents[role] = await signInAs(server, person);
  }
  return { teamId, people: people as TestTeam['people'], agents: agents as TestTeam['agents'] };
}
