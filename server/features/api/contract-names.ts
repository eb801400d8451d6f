import { z } from 'zod';
import * as accessTokens from '#contract/access-tokens.ts';
import * as api from '#contract/api.ts';
import * as briefs from '#contract/briefs.ts';
import * as comparisons from '#contract/comparisons.ts';
import * as costs from '#contract/costs.ts';
import * as features from '#contract/features.ts';
import * as fits from '#contract/fits.ts';
import * as grid from '#contract/grid.ts';
import * as ground from '#contract/ground.ts';
import * as layers from '#contract/layers.ts';
import * as optionFiles from '#contract/option-files.ts';
import * as options from '#contract/options.ts';
import * as outlooks from '#contract/outlook-endpoints.ts';
import * as people from '#contract/people.ts';
import * as plants from '#contract/plants.ts';
import * as problem from '#contract/problem.ts';
import * as runs from '#contract/runs.ts';
import * as sites from '#contract/sites.ts';
import * as studies from '#contract/studies.ts';
import * as uploads from '#contract/uploads.ts';
import * as workingGrid from '#contract/working-grid.ts';
import * as works from '#contract/works.ts';
import type { Endpoint } from '#contract/endpoint.ts';
import * as layerSource from '#sim-core/spec/layer-source.ts';
import * as places from '#sim-core/spec/places.ts';
import * as processes from '#sim-core/spec/processes.ts';
import * as replicateRecord from '#sim-core/spec/replicate-record.ts';
import * as runResult from '#sim-core/spec/run-result.ts';
import * as runSpec from '#sim-core/spec/run-spec.ts';
import * as studyRun from '#sim-core/spec/study-run.ts';
import * as weatherSource from '#sim-core/spec/weather-source.ts';

/** Modules of the contract by the heading under which their endpoints are described. */
const headings: Record<string, object> = {
  'People and teams': people,
  'Access tokens': accessTokens,
  Sites: sites,
  'Plant library': plants,
  Uploads: uploads,
  'Layers and features': ground,
  'Working cell': workingGrid,
  Outlooks: outlooks,
  Options: options,
  'Options as files': optionFiles,
  Costs: costs,
  Runs: runs,
  Comparisons: comparisons,
  Fits: fits,
  'What matters': studies,
  Briefs: briefs,
  'About the API': api,
};
const parts = [features, grid, layers, problem, works, runSpec, runResult, replicateRecord, studyRun];
const smallParts = [layerSource, places, processes, weatherSource];

/** What an endpoint is called in the contract, and under which heading it stands. */
export interface EndpointName {
  readonly name: string;
  readonly heading: string;
}

const isEndpoint = (value: unknown): value is Endpoint =>
  typeof value === 'object' && value !== null && 'method' in value && 'summary' in value;

/** Every endpoint of the contract with its name. */
export const endpointNames: ReadonlyMap<Endpoint, EndpointName> = new Map(
  Object.entries(headings).flatMap(([heading, module]) =>
    Object.entries(module).flatMap(([name, value]: [string, unknown]) =>
      isEndpoint(value) ? [[value, { name, heading }] as const] : [],
    ),
  ),
);

/** `site` to `Site`. */
export const capital = (name: string) => name[0].toUpperCase() + name.slice(1);

/** Schemas that the contract names, by their names in the description: `siteSchema` is `Site`. */
export function namedSchemas(): Map<z.ZodType, string> {
  const names = new Map<z.ZodType, string>();
  for (const module of [...Object.values(headings), ...parts, ...smallParts])
    for (const [name, value] of Object.entries(module) as [string, unknown][])
      if (value instanceof z.ZodType && name.endsWith('Schema') && !names.has(value))
        names.set(value, capital(name.slice(0, -'Schema'.length)));
  return names;
}
