import { Readable } from 'node:stream';
import type { Option } from '#contract/options.ts';
import { worksOf } from '#contract/works.ts';
import type { LayerPart } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import { demoRasters } from '#rasters/demo/sallow-reach.ts';
import type { RunnerProgress } from '#sim-core/ensemble/runner.ts';
import { makeBrief } from '../features/briefs/brief.service.ts';
import { keepCosts } from '../features/costs/costs.service.ts';
import { createOption, listOptions } from '../features/options/option.service.ts';
import { addLayer, changeLayer, setLayerClasses } from '../features/sites/layer.service.ts';
import { listSitesOf } from '../features/sites/site-reply.ts';
import { setOutlook } from '../features/sites/outlooks/outlook.service.ts';
import { createSite, deleteSite, setPlant } from '../features/sites/site.service.ts';
import { addMember, addPerson, addTeam } from '../people/people.repository.ts';
import type { Services } from '../services.ts';
import { demoAccounts } from './demo-accounts.ts';
import { compareDemoOptions } from './demo-comparison.ts';
import { layerValues } from './demo-ground.ts';
import { demoOptions } from './demo-options.ts';
import {
  demoComparison,
  demoCosts,
  demoHabitatClasses,
  demoOutlook,
  demoPlant,
  demoSiteName,
  demoTeamName,
} from './demo-place.ts';
import { runDemoOption } from './demo-run.ts';
import { anyoneAt, deleteTeam, renameTeam, teamIdsNamed } from './demo.repository.ts';

/** The team's name until everything of it is there: a start that finds it knows that an earlier one was broken off. */
const unfinishedName = `${demoTeamName} (being made)`;
const nameOf = (role: string) => demoAccounts.find((account) => account.role === role)!.name;

const seed = 'sallow-reach';

export interface LoadDemoInput {
  /** of each option in the comparison, under each outlook; the demo's own unless said */
  replicates?: number;
  /** told how far the runs of the comparison are, which take up nearly all the time */
  onProgress?: (progress: RunnerProgress) => void;
}

/**
 * Loads the invented team, place, runs, comparison and brief through the same functions that serve people. Its people
 * come last: once they are there nothing is done any more, and what a start left half made is wiped and made again.
 */
export async function loadDemo(
  services: Services,
  { replicates = demoComparison.replicates, onProgress }: LoadDemoInput = {},
): Promise<void> {
  const { dataSource, write, clock, passwords, log } = services;
  const emails = demoAccounts.map((account) => account.email);
  if (await anyoneAt(dataSource.manager, emails)) return;
  log.info('loading the demo');
  for (const teamId of await teamIdsNamed(dataSource.manager, unfinishedName))
    await wipeTeam(services, teamId);

  const team = await write((manager) => addTeam(manager, unfinishedName, clock()));
  const site = await makeSite(services, team.id);
  const options = await makeOptions(services, site);
  for (const option of options.slice(0, 2))
    await runDemoOption(services, site, option, {
      name: `${option.name}, demo`,
      seed,
      by: nameOf('modeller'),
    });
  const by = nameOf('modeller');
  const comparisonId = await compareDemoOptions(services, site, options, {
    replicates,
    seed,
    by,
    onProgress,
  });
  await makeBrief(services, site.id, comparisonId, nameOf('manager'), demoTeamName);

  const passwordHashes = await Promise.all(demoAccounts.map(({ password }) => passwords.hash(password)));
  await write(async (manager) => {
    await renameTeam(manager, team.id, demoTeamName);
    for (const [i, { email, name, role }] of demoAccounts.entries()) {
      const person = await addPerson(manager, { email, name, passwordHash: passwordHashes[i] }, clock());
      await addMember(manager, team.id, person.id, role, clock());
    }
  });
}

async function wipeTeam(services: Services, teamId: string): Promise<void> {
  for (const { id } of await listSitesOf(services.dataSource.manager, teamId)) await deleteSite(services, id);
  await services.write((manager) => deleteTeam(manager, teamId));
}

async function makeSite(services: Services, teamId: string): Promise<Site> {
  const by = nameOf('modeller');
  const { uploadLimitBytes } = services.config;
  let site: Site | undefined;
  for (const { name, fileName, bytes } of demoRasters()) {
    const part: LayerPart = name;
    const file = await services.blobs.receive(Readable.from([bytes]), uploadLimitBytes);
    const raster = { part, file, fileName, by };
    site = site
      ? await addLayer(services, site.id, raster)
      : await createSite(services, { teamId, name: demoSiteName, invented: true, ...raster });
  }
  const { id, layers } = site!;
  const ofPart = (part: LayerPart) => layers.find((layer) => layer.part === part)!;
  await setLayerClasses(services, id, ofPart('habitat').id, demoHabitatClasses);
  // No curve hangs on it, so it changes no run: it is there to try curves on.
  const vertical = { datum: 'an invented datum', unit: 'metre' } as const;
  await changeLayer(services, id, ofPart('elevation').id, { vertical });
  await setPlant(services, id, demoPlant);
  await keepCosts(services, id, demoCosts, nameOf('manager'));
  return setOutlook(services, id, demoOutlook);
}

/** Wait and the demo's own options, in that order. */
async function makeOptions(services: Services, site: Site): Promise<Option[]> {
  const cover = site.layers.find((layer) => layer.part === 'cover')!;
  for (const { name, works } of demoOptions(await layerValues(services, site.id, cover.hash)))
    await createOption(
      services,
      site.id,
      { name, note: '', works: worksOf(works), sets: [] },
      nameOf('manager'),
    );
  return listOptions(services.dataSource.manager, site.id);
}
