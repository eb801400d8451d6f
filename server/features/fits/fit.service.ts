import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import {
  runOfPlan,
  type Fit,
  type FitPlan,
  type FitState,
  type startFit as startEndpoint,
} from '#contract/fits.ts';
import { startAbc } from '#sim-core/fit/abc.ts';
import { fieldProblems, type FieldProblem } from '#sim-core/spec/problems.ts';
import { processOf } from '#sim-core/spec/all-parameters.ts';
import type { FitRow } from '#server/database/entities/fit.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import type { Manager } from '#server/database/manager.ts';
import { gridOf } from '#server/database/site-grid.ts';
import { notFound, ProblemError, refuseFields } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { checkLayers, checkOnGrid, layerHashes } from '#server/specs/check-spec.ts';
import { foreignHashes } from '#server/specs/site-layers.repository.ts';
import { fitReply, requireFit } from './fit-reply.ts';
import { deleteFitRow, findSite, insertFit, updateFit } from './fit.repository.ts';

export interface FitAddress {
  siteId: string;
  fitId: string;
}

/**
 * Registers a fit on the grid and layers that the site has now.
 * @throws ProblemError at each field that makes its runs impossible
 */
export const startFit = (
  services: Services,
  siteId: string,
  { name, ...plan }: z.output<typeof startEndpoint.body>,
  by: string,
): Promise<Fit> =>
  services.write(async (manager) => {
    const site = await findSite(manager, siteId);
    if (!site) throw notFound();
    const problems = await planProblems(manager, site, plan);
    if (problems.length > 0) throw refuseFields(problems);
    const row: FitRow = {
      id: randomUUID(),
      siteId,
      name,
      status: 'running',
      plan: JSON.stringify(plan),
      state: JSON.stringify(startAbc()),
      runs: 0,
      generations: 0,
      grid: JSON.stringify(gridOf(site)),
      accepted: null,
      startedAt: services.clock().toISOString(),
      startedBy: by,
    };
    const used = layerHashes(runOfPlan(plan).data!).map(({ hash }) => hash);
    await insertFit(manager, row, [...used, ...plan.data.maps.map(({ layer }) => layer)]);
    return fitReply(manager, siteId, row.id);
  });

async function planProblems(manager: Manager, site: SiteRow, plan: FitPlan): Promise<FieldProblem[]> {
  const parsed = runOfPlan(plan);
  if (!parsed.success)
    return fieldProblems(parsed.error).map(({ field, message }) => ({ field: `base.${field}`, message }));
  const spec = parsed.data;
  const ofSpec = [...(await checkLayers(manager, site.id, spec)), ...checkOnGrid(spec, site)].map(
    ({ field, message }) => ({ field: field.replace(/^spec/, 'base'), message }),
  );
  const foreign = await foreignHashes(
    manager,
    site.id,
    plan.data.maps.map(({ layer }) => layer),
  );
  const ofMaps = plan.data.maps.flatMap(({ layer, year }, i) =>
    foreign.has(layer)
      ? [
          {
            field: `data.maps.${i}.layer`,
            message: `The resurvey of ${year} is no layer of this site on the cells that it has now. Load the site again`,
          },
        ]
      : [],
  );
  return [
    ...ofSpec,
    ...ofMaps,
    ...yearProblems(plan),
    ...figureProblems(plan),
    ...rateProblems(plan),
    ...sizeProblems(plan),
  ];
}

/** Surveys must fall in simulated years, one of a kind each, and there must be one. */
function yearProblems({ base, data }: FitPlan): FieldProblem[] {
  const { surveyYear } = base;
  const last = surveyYear + base.years;
  const problems: FieldProblem[] = [];
  const say = (field: string, message: string) => problems.push({ field: `data.${field}`, message });
  if (data.maps.length + data.areas.length + data.fronts.length === 0)
    problems.push({ field: 'data', message: 'Found no survey; a fit needs at least one' });
  for (const kind of ['maps', 'areas'] as const)
    data[kind].forEach(({ year }, i) => {
      if (year <= surveyYear || year > last)
        say(`${kind}.${i}.year`, `Found ${year}; a later survey falls in ${surveyYear + 1} to ${last}`);
      if (data[kind].findIndex((other) => other.year === year) < i)
        say(`${kind}.${i}.year`, `Found ${year} twice; a year stands once`);
    });
  data.fronts.forEach(({ from, until }, i) => {
    if (until <= from) say(`fronts.${i}.until`, `Found ${until}; expected a year after ${from}`);
    else if (from < surveyYear || until > last)
      say(`fronts.${i}.from`, `Found ${from} to ${until}; fronts are measured from ${surveyYear} to ${last}`);
  });
  return problems;
}

/** Three figures of each map, one of each area and front; which they are hangs on the rasters, which browsers read. */
function figureProblems({ data, figures }: FitPlan): FieldProblem[] {
  const expected = 3 * data.maps.length + data.areas.length + data.fronts.length;
  return figures.length === expected
    ? []
    : [{ field: 'figures', message: `Found ${figures.length}; these surveys come to ${expected}` }];
}

/** A rate is fitted or uncertain, not both, and belongs to something that goes on. */
function rateProblems({ base, rates }: FitPlan): FieldProblem[] {
  return rates.flatMap(({ name }, i) => {
    const part = processOf(name);
    if (part && !base.processes[part])
      return [{ field: `rates.${i}.name`, message: `${name} belongs to ${part}, which are off` }];
    if (base.uncertain?.rates[name])
      return [{ field: `rates.${i}.name`, message: `${name} stands among the uncertain rates too` }];
    return [];
  });
}

function sizeProblems({ population, priorRuns, mostRuns }: FitPlan): FieldProblem[] {
  if (priorRuns < 2 * population)
    return [
      {
        field: 'priorRuns',
        message: `Found ${priorRuns}; expected at least ${2 * population}, twice the population`,
      },
    ];
  if (mostRuns < priorRuns)
    return [
      { field: 'mostRuns', message: `Found ${mostRuns}; the first generation alone takes ${priorRuns}` },
    ];
  return [];
}

/**
 * Stores where a fit stands. All follows from its plan, so a state with as many runs is the same one, sent again.
 * @throws ProblemError `conflict` of one with fewer runs, or when the fit no longer runs; at fields that do not belong
 * to its plan
 */
export const putFitState = (
  services: Services,
  { siteId, fitId }: FitAddress,
  state: FitState,
): Promise<{ runs: number }> =>
  services.write(async (manager) => {
    const row = await requireFit(manager, siteId, fitId);
    const { plan, state: stored } = await fitReply(manager, siteId, fitId);
    refuseForeignState(plan, state);
    if (state.runs === stored.runs && state.ending === stored.ending) return { runs: state.runs };
    if (row.status !== 'running')
      throw new ProblemError(
        'conflict',
        `This fit is ${row.status}. Go on with it, then send where it stands.`,
      );
    if (state.runs < stored.runs)
      throw new ProblemError(
        'conflict',
        `Found ${state.runs} runs; ${stored.runs} are stored already. Another tab works on this fit: load the page again.`,
      );
    await updateFit(manager, fitId, {
      state: JSON.stringify(state),
      runs: state.runs,
      generations: state.generations.length,
      ...(state.ending && { status: 'finished' }),
    });
    return { runs: state.runs };
  });

function refuseForeignState(plan: FitPlan, state: FitState): void {
  const wrong = (field: 'population' | 'kept' | 'prior') =>
    state[field].findIndex(({ point }) => point.length !== plan.rates.length);
  const problems = (['population', 'kept', 'prior'] as const).flatMap((field) => {
    const at = wrong(field);
    return at < 0
      ? []
      : [
          {
            field: `${field}.${at}.point`,
            message: `Expected ${plan.rates.length} shares, one for each rate`,
          },
        ];
  });
  for (const field of ['population', 'kept', 'prior'] as const) {
    const at = state[field].findIndex(({ summaries }) => summaries.length !== plan.figures.length);
    if (at >= 0)
      problems.push({
        field: `${field}.${at}.summaries`,
        message: `Expected ${plan.figures.length} figures`,
      });
  }
  if (state.runs > plan.mostRuns)
    problems.push({ field: 'runs', message: `Found ${state.runs}; this fit has at most ${plan.mostRuns}` });
  if (state.population.length > plan.population)
    problems.push({ field: 'population', message: `Found more than ${plan.population}` });
  if (problems.length > 0) throw refuseFields(problems);
}

async function setStatus(
  services: Services,
  { siteId, fitId }: FitAddress,
  from: string,
  to: string,
): Promise<Fit> {
  return services.write(async (manager) => {
    const row = await requireFit(manager, siteId, fitId);
    // Said twice, or by two people: it is so already.
    if (row.status !== to) {
      if (row.status !== from)
        throw new ProblemError(
          'conflict',
          `This fit is ${row.status}; only one that is ${from} can be ${to}.`,
        );
      await updateFit(manager, fitId, { status: to });
    }
    return fitReply(manager, siteId, fitId);
  });
}

/** @throws ProblemError `conflict` once it is finished */
export const stopFit = (services: Services, address: FitAddress): Promise<Fit> =>
  setStatus(services, address, 'running', 'stopped');

/** @throws ProblemError `conflict` once it is finished */
export const resumeFit = (services: Services, address: FitAddress): Promise<Fit> =>
  setStatus(services, address, 'stopped', 'running');

export const deleteFit = (services: Services, { siteId, fitId }: FitAddress): Promise<void> =>
  services.write(async (manager) => {
    await requireFit(manager, siteId, fitId);
    await deleteFitRow(manager, fitId);
  });
