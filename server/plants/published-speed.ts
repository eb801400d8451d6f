import type { Plant } from '#contract/plants.ts';
import type { PublishedSpeed } from '#sim-core/cautions/find-cautions.ts';

/** What the profile of a plant gives as published of its lateral spread; undefined where it gives no range. */
export function publishedSpeed({ sources }: Pick<Plant, 'sources'>): PublishedSpeed | undefined {
  const told = sources.lateralSpread;
  return told?.range && { least: told.range.low, most: told.range.high, source: told.source };
}
