import { demoAccounts } from './demo/demo-accounts.ts';
import { makeLink, dropLinks } from './people/one-time-links.repository.ts';
import { countPeople, endSessionsOf, findPersonByEmail } from './people/people.repository.ts';
import { addTeamWithAdmin } from './people/team-with-admin.repository.ts';
import type { Services } from './services.ts';

const linkHours = 24;
const demoAddresses = demoAccounts.map((account) => account.email);

/** What has to be done about people before the first request is answered. */
export interface FirstStart {
  /** the demo has to be loaded, or mended if its loading was interrupted */
  demo: boolean;
  /** where the first admin is made, once, by whoever reads the console */
  setupLink: string | undefined;
}

/** People besides the invented ones of the demo. */
const countRealPeople = ({ dataSource }: Services) => countPeople(dataSource.manager, demoAddresses);

async function makeFirstAdmin({ config, write, passwords, clock }: Services): Promise<void> {
  if (!config.firstAdmin) return;
  const { email, password, team } = config.firstAdmin;
  const passwordHash = await passwords.hash(password);
  const name = email.slice(0, email.indexOf('@'));
  await write(async (manager) => {
    await dropLinks(manager, 'setup', null);
    await addTeamWithAdmin(manager, team, { email, name, passwordHash }, clock());
  });
}

/** Ends what the demo's accounts have open: their password is public. */
const closeDemo = ({ write }: Services): Promise<void> =>
  write(async (manager) => {
    for (const email of demoAddresses) {
      const person = await findPersonByEmail(manager, email);
      if (person) await endSessionsOf(manager, person.id);
    }
  });

/**
 * Sees to it that somebody can get in: the admin of the environment, else the demo, else a set-up link. `auto` leaves the
 * demo out as soon as there is anybody real, and each start replaces the set-up link of the one before.
 */
export async function prepareFirstStart(services: Services): Promise<FirstStart> {
  const { config, write, clock } = services;
  if (config.demo === 'off') await closeDemo(services);
  if ((await countRealPeople(services)) === 0) await makeFirstAdmin(services);
  const empty = (await countRealPeople(services)) === 0;
  if (config.demo === 'on' || (config.demo === 'auto' && empty)) return { demo: true, setupLink: undefined };
  if (!empty) return { demo: false, setupLink: undefined };
  const expiresAt = new Date(clock().getTime() + linkHours * 3_600_000);
  const token = await write((manager) => makeLink(manager, 'setup', null, expiresAt));
  return { demo: false, setupLink: `${config.publicUrl}/setup/${token}` };
}
