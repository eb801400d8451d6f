import type { FittedRate } from '#sim-core/fit/fit-run.ts';
import { allParameters, anyRateNames, processOf, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { Processes } from '#sim-core/spec/processes.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';

/** A plant as far as a fit reads it. */
export interface FittedPlant {
  readonly rates: Rates;
  readonly processes?: Partial<Processes> | undefined;
  readonly beliefs: Beliefs;
}

/** What the plant says of a rate now; undefined of one whose process is off. */
export function valueOf({ rates, processes }: FittedPlant, name: AnyRateName): number | undefined {
  const part = processOf(name);
  const table: object | undefined = part === undefined ? rates : processes?.[part];
  return (table as Partial<Record<AnyRateName, number>> | undefined)?.[name];
}

/** The rates that can be fitted: those of the plant and of processes that are on. */
export const fittableRates = (plant: FittedPlant): AnyRateName[] =>
  anyRateNames.filter((name) => valueOf(plant, name) !== undefined);

/**
 * What is believed of a rate before a fit: what the plant says, else anything from a third of its value to three times as
 * much, or a quarter of its range to both sides where values may be below 0 (common practice, no source).
 */
export function priorOf(plant: FittedPlant, name: AnyRateName): Belief {
  const known = plant.beliefs[name];
  if (known) return known;
  const { min, max } = allParameters[name];
  const value = valueOf(plant, name)!;
  const [low, high] =
    min < 0
      ? [value - (max - min) / 8, value + (max - min) / 8]
      : value > 0
        ? [value / 3, value * 3]
        : [min, min + (max - min) / 10];
  const round = (x: number) => Number(x.toPrecision(3));
  return { law: 'uniform', low: Math.max(min, round(low)), high: Math.min(max, round(high)) };
}

/** The rates that most fits ask about. */
export const usualRates: readonly AnyRateName[] = ['lateralSpread', 'fillRate'];

export const fittedRates = (
  plant: FittedPlant,
  chosen: ReadonlyMap<AnyRateName, Belief | undefined>,
): FittedRate[] =>
  fittableRates(plant).flatMap((name) =>
    chosen.has(name) ? [{ name, belief: chosen.get(name) ?? priorOf(plant, name) }] : [],
  );
