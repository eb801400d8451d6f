import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { Area } from '#sim-core/spec/places.ts';

/** A loss of the outlook with the years in which it comes, ascending; without an area it takes the whole site. */
export interface DatedLoss {
  readonly years: readonly number[];
  readonly share: number;
  readonly area: Area | undefined;
}

/**
 * The losses of a run's outlook with the years in which this replicate meets them. A loss by chance draws once for every
 * simulated year from a stream of its own (`losses/<its place>/<replicate>`): options share what comes, a longer horizon
 * begins with the same years, and another loss, another span of years or a larger chance leaves its luck as it was.
 */
export function datedLosses(
  spec: Pick<RunSpec, 'seed' | 'replicate' | 'surveyYear' | 'years' | 'losses'>,
): DatedLoss[] {
  const { seed, replicate, surveyYear, years, losses = [] } = spec;
  return losses.map((loss, place) => {
    const { share, area } = loss;
    if ('year' in loss) return { years: [loss.year], share, area };
    const { chance, from = surveyYear + 1, until = surveyYear + years } = loss;
    const words = stream(seed, `losses/${place}/${replicate}`);
    const met = Array.from({ length: years }, (_, y) => surveyYear + 1 + y).filter((year) => {
      // Drawn in every year, so that the years in which it may come change no luck.
      const comes = uniform(words.int32() >>> 0) < chance;
      return comes && year >= from && year <= until;
    });
    return { years: met, share, area };
  });
}
