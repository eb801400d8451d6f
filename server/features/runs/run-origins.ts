import { isDeepStrictEqual } from 'node:util';
import { z } from 'zod';
import { otherOutlookSchema, outlookSchema, outlookWeather, type Outlook } from '#contract/outlooks.ts';
import { plantSchema } from '#contract/plants.ts';
import type { RunOrigins } from '#contract/runs.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { knownOrigin } from '#server/plants/plant-origin.ts';

/** What a spec took from its site, by name: found by comparing, so that no run can claim what it did not take. */
export async function runOrigins(manager: Manager, site: SiteRow, spec: RunSpec): Promise<RunOrigins> {
  const plant = readJson(plantSchema, site.plant);
  const known = await knownOrigin(manager, site, plant);
  const outlooks = [
    readJson(outlookSchema, site.outlook),
    ...(site.otherOutlooks === null ? [] : readJson(z.array(otherOutlookSchema), site.otherOutlooks)),
  ];
  return {
    outlook: outlookOf(outlooks, spec),
    plant: {
      name: plant.name,
      profile: known?.name
        ? {
            name: known.name,
            version: known.origin.kind === 'library' ? known.origin.version : null,
            changed: known.changed === true,
          }
        : null,
      asSet: same(plant.rates, spec.rates),
    },
  };
}

function outlookOf(outlooks: readonly Outlook[], spec: RunSpec): RunOrigins['outlook'] {
  for (const outlook of outlooks) {
    if (outlook.surveyYear !== spec.surveyYear || outlook.years !== spec.years) continue;
    for (const weather of ['listed', 'drawn'] as const) {
      if (weather === 'drawn' && outlook.drawn === null) continue;
      const { droughtIndex, trend, losses } = outlookWeather(
        outlook,
        weather === 'drawn' ? 'ensemble' : 'single run',
      );
      if (
        same(droughtIndex, spec.droughtIndex) &&
        same(trend ?? null, spec.trend ?? null) &&
        same(losses ?? [], spec.losses ?? [])
      )
        return { name: outlook.name, weather };
    }
  }
  return null;
}

/** By way of JSON, which drops what is undefined. */
const same = (a: unknown, b: unknown) =>
  isDeepStrictEqual(JSON.parse(JSON.stringify(a)), JSON.parse(JSON.stringify(b)));
