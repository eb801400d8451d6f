import type { Fit, FitState } from '#contract/fits.ts';
import { resurveysOf } from '#contract/layer-sources.ts';
import type { Site } from '#contract/sites.ts';
import { startAbc } from '#sim-core/fit/abc.ts';
import type { Agent } from './people.ts';
import { specFor } from './runs.ts';
import { geoTiff } from './sites.ts';

/** Puts a resurvey on `makeSite`: more of it stands than at the start. */
export async function addResurvey(agent: Agent, siteId: string, year: number): Promise<Site> {
  const values = Float32Array.from({ length: 24 }, (_, i) => Math.min(1, i / 20 + (year - 2024) / 100));
  const { body } = await agent
    .post(`/api/sites/${siteId}/layers`)
    .field('part', 'resurvey')
    .field('year', String(year))
    .attach('file', geoTiff(values), `resurvey-${year}.tif`)
    .expect(200);
  return body as Site;
}

/** What starts a fit of two rates to the resurveys of a site. */
export function fitFor(site: Site, changes: object = {}) {
  const base = { ...specFor(site), replicate: undefined };
  const maps = resurveysOf(site).map(({ hash, unit, year }) => ({
    layer: hash,
    unit,
    year,
    areaError: 0.05,
  }));
  return {
    name: 'A fit',
    base,
    data: { maps, areas: [], fronts: [] },
    rates: [
      { name: 'lateralSpread', belief: { law: 'uniform', low: 0.5, high: 1.5 } },
      { name: 'fillRate', belief: { law: 'uniform', low: 0.5, high: 1.5 } },
    ],
    figures: maps.flatMap(({ year }) => [
      { kind: 'map area', year, observed: 40, error: 2 },
      { kind: 'map edge', year, observed: 20, error: 0 },
      { kind: 'map reach', year, observed: 1, error: 0 },
    ]),
    population: 20,
    priorRuns: 40,
    mostRuns: 200,
    leastAcceptance: 0.03,
    ...changes,
  };
}

export async function startTestFit(agent: Agent, site: Site, changes: object = {}): Promise<Fit> {
  const { body } = await agent.post(`/api/sites/${site.id}/fits`).send(fitFor(site, changes)).expect(200);
  return body as Fit;
}

/** A state in which the first generation is complete: members evenly through both beliefs, the first rate weighed to its low end. */
export function firstGeneration({ plan }: Fit, changes: Partial<FitState> = {}): FitState {
  const { population, priorRuns } = plan;
  const summaries = plan.figures.map(({ observed }) => observed);
  const particles = Array.from({ length: population }, (_, i) => ({
    point: plan.rates.map((__, r) => (r === 0 ? 0.2 * ((i + 0.5) / population) : (i + 0.5) / population)),
    summaries,
    distance: i / population,
    weight: 1 / population,
  }));
  return {
    ...startAbc(),
    scales: plan.figures.map(() => 1),
    generations: [{ tolerance: 1, runs: priorRuns, acceptance: population / priorRuns }],
    population: particles,
    prior: particles.map(({ point }) => ({ point, summaries })),
    kept: [],
    runs: priorRuns,
    ...changes,
  };
}
