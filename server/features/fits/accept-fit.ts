import type { Fit } from '#contract/fits.ts';
import type { Plant, PlantOrigin } from '#contract/plants.ts';
import { plantOriginSchema, plantSchema } from '#contract/plants.ts';
import { ratesAt } from '#sim-core/fit/fit-run.ts';
import { evenValues, weightedQuantiles } from '#sim-core/fit/posterior.ts';
import { readJson } from '#server/database/json-column.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import type { Manager } from '#server/database/manager.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import { findPlant, insertVersion, versionFacts } from '#server/plants/library.repository.ts';
import type { Services } from '#server/services.ts';
import { fitReply } from './fit-reply.ts';
import { findSite, updateFit, updatePlantOfSite } from './fit.repository.ts';
import type { FitAddress } from './fit.service.ts';

/** Values that stand for the law of a fitted rate. */
const keptValues = 100;

/**
 * Takes the last complete generation over into the site's plant: each fitted rate becomes a law of values, with the fit
 * as its source. Where the plant came from a profile of the team, it is kept there as a new version too.
 * @throws ProblemError `conflict` while no generation is complete, or while the fit runs; `plant` where the plant no
 * longer has a process that a fitted rate belongs to
 */
export const acceptFit = (services: Services, { siteId, fitId }: FitAddress, by: string): Promise<Fit> =>
  services.write(async (manager) => {
    const fit = await fitReply(manager, siteId, fitId);
    const site = await findSite(manager, siteId);
    if (!site) throw notFound();
    if (fit.status === 'running')
      throw new ProblemError(
        'conflict',
        'This fit still runs. Stop it, or let it come to its end, then accept it.',
      );
    if (fit.state.population.length === 0)
      throw new ProblemError(
        'conflict',
        `Found ${fit.runs} runs of ${fit.plan.priorRuns} of the first generation; until that is complete there is nothing to accept. Let the fit go on.`,
      );
    const at = services.clock().toISOString();
    const before = readJson(plantSchema, site.plant);
    const parsed = plantSchema.safeParse(fittedPlant(fit, before, at));
    if (!parsed.success)
      throw fieldProblem(
        'plant',
        `The plant has changed since the fit began: ${parsed.error.issues[0].message}. Fit again from the plant as it is now`,
      );
    const origin = await nextVersion(manager, site, parsed.data, { note: sourceOf(fit, at), at, by });
    await updatePlantOfSite(manager, siteId, parsed.data, origin);
    const what = origin
      ? `plant of the site, and version ${origin.version} of its profile`
      : 'plant of the site';
    await updateFit(manager, fitId, { accepted: JSON.stringify({ at, by, what }) });
    return fitReply(manager, siteId, fitId);
  });

/** The plant with the fitted rates' medians, laws and sources in the place of its own. */
export function fittedPlant({ name, plan, state, runs }: FittedParts, before: Plant, at: string): Plant {
  const weights = state.population.map(({ weight }) => weight);
  const drawn = state.population.map(({ point }) => ratesAt(plan.rates, point));
  const { rates, processes, beliefs, sources } = structuredClone(before);
  const grazers = processes?.grazers as Record<string, number> | undefined;
  const fragments = processes?.fragments as Record<string, number> | undefined;
  for (const { name: rate } of plan.rates) {
    const values = drawn.map((row) => row[rate]!);
    const [middle] = weightedQuantiles(values, weights, [0.5]);
    const place = [rates as Record<string, number>, grazers, fragments].find(
      (table) => table && rate in table,
    );
    if (place) place[rate] = middle;
    beliefs[rate] = { law: 'values', values: evenValues(values, weights, keptValues) };
    sources[rate] = { sure: 'measured here', source: sourceOf({ name, plan, runs, state }, at) };
  }
  return { ...before, rates, ...(processes && { processes }), beliefs, sources };
}
type FittedParts = Pick<Fit, 'name' | 'plan' | 'state' | 'runs'>;

/** Where a fitted rate comes from, in words. */
function sourceOf({ name, plan, state, runs }: FittedParts, at: string): string {
  const { maps, areas, fronts } = plan.data;
  const years = (list: readonly { year: number }[]) => list.map(({ year }) => year).join(', ');
  const data = [
    maps.length > 0 && `resurveys of ${years(maps)}`,
    areas.length > 0 && `covered areas of ${years(areas)}`,
    fronts.length > 0 && `fronts of ${fronts.map(({ from, until }) => `${from} to ${until}`).join(', ')}`,
  ].filter((part) => part !== false);
  return (
    `Fit “${name}” of ${at.slice(0, 10)} to ${data.join('; ')}, from the survey of ${plan.base.surveyYear}: approximate Bayesian computation, ` +
    `${runs} runs, ${state.generations.length} generations, ${state.population.length} members. Rates that were fitted together are kept one by one; how they hang together is not.`
  ).slice(0, 600);
}

/** Keeps the plant as the newest version of the profile that the site's plant came from; null where it came from none. */
async function nextVersion(
  manager: Manager,
  { teamId, plantOrigin }: SiteRow,
  plant: Plant,
  { note, at, by }: { note: string; at: string; by: string },
): Promise<Extract<PlantOrigin, { kind: 'library' }> | null> {
  const origin = plantOrigin === null ? null : readJson(plantOriginSchema, plantOrigin);
  if (origin?.kind !== 'library' || !(await findPlant(manager, teamId, origin.plantId))) return null;
  const [newest] = await versionFacts(manager, [origin.plantId]);
  const version = newest.version + 1;
  await insertVersion(manager, {
    ...{ plantId: origin.plantId, version, plant: JSON.stringify(plant) },
    ...{ note: note.slice(0, 500), savedAt: at, savedBy: by },
  });
  return { ...origin, version };
}
