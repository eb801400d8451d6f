import type { Brief } from '#contract/briefs.ts';
import type { Comparison } from '#contract/comparisons.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import type { Agent } from './people.ts';
import { specFor } from './runs.ts';

/** What starts a comparison of some options on `makeSite`, four years from 2024, eight replicates. */
export function planFor(site: Site, options: readonly Option[], changes: object = {}) {
  const { version, mode, seed, surveyYear, years, stepsPerYear, boundary, rates, target, layers } =
    specFor(site);
  return {
    name: 'A comparison',
    common: { version, mode, seed, surveyYear, years, stepsPerYear, boundary, rates, target, layers },
    options: options.map(({ id }, i) => ({ optionId: id, cost: i * 1000 })),
    outlooks: [{ name: 'As drawn', droughtIndex: { kind: 'palmer-type', standardDeviation: 2 } }],
    replicates: 8,
    stop: null,
    droughtThreshold: -3,
    mapYears: [2026, 2028],
    currency: 'EUR',
    ...changes,
  };
}

export async function optionsOf(agent: Agent, siteId: string): Promise<Option[]> {
  const { body } = await agent.get(`/api/sites/${siteId}/options`).expect(200);
  return (body as { options: Option[] }).options;
}

/** Starts a comparison of all options of a site. */
export async function startTestComparison(
  agent: Agent,
  site: Site,
  changes: object = {},
): Promise<Comparison> {
  const { body } = await agent
    .post(`/api/sites/${site.id}/comparisons`)
    .send(planFor(site, await optionsOf(agent, site.id), changes))
    .expect(200);
  return body as Comparison;
}

/** A replicate as a browser sends it, with a digest that follows from its number. */
export const replicateOf = (replicate: number, changes: Partial<ReplicateRecord> = {}): ReplicateRecord => ({
  replicate,
  digest: replicate.toString(16).padStart(64, '0'),
  recoveredYear: 2027,
  lostYear: null,
  droughtYear: null,
  coveredArea: [1, 2, 3, 4, 5],
  droughtIndex: [0.5, -1, -2, 0],
  lost: { drought: 1, background: 0, grazing: 0, events: 0 },
  drawn: {},
  ...changes,
});

/** Gives every ensemble so many futures, which recover in the order of the options, and the option's closing map. */
export async function fillComparison(
  agent: Agent,
  { siteId, id, plan }: Comparison,
  replicates = 4,
): Promise<void> {
  const ensembles = plan.options.flatMap((_, option) =>
    plan.outlooks.map((__, outlook) => ({ option, outlook })),
  );
  for (const { option, outlook } of ensembles) {
    const records = Array.from({ length: replicates }, (_, replicate) =>
      replicateOf(replicate, {
        recoveredYear: option > 0 || replicate % 4 === 0 ? 2028 - (option > 0 ? 2 : 0) : null,
        droughtYear: replicate % 2 === 0 ? null : 2025 + option,
      }),
    );
    await agent
      .put(`/api/sites/${siteId}/comparisons/${id}/ensembles/${option}/${outlook}/replicates`)
      .send({ replicates: records })
      .expect(200);
  }
}

/** A brief of a comparison that has futures. */
export async function makeTestBrief(agent: Agent, site: Site, comparison: Comparison): Promise<Brief> {
  await fillComparison(agent, comparison);
  const { body } = await agent
    .post(`/api/sites/${site.id}/briefs`)
    .send({ comparisonId: comparison.id })
    .expect(200);
  return body as Brief;
}
