import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';
import type { StepRates } from './step-rates.ts';

/**
 * Years for a cell to fill from one share of its capacity to another, with its neighbours as full as itself and no
 * losses: steps of u' = σ_Δ u + (1 − σ_Δ u)(1 − e^(−βgu)), the last one in part, as growth by a constant factor. In the
 * limit of short steps this is logistic growth at the fill-in rate.
 *
 * @param growth g (1 + b_M M): growth as a multiple of growth on good ground
 * @param from,to shares of the capacity; from is above 0
 * @returns 0 where `from` is `to` or more; Infinity where the cell never gets there
 */
export function fillTime(
  { years, carryOver, recruits }: Pick<StepRates, 'years' | 'carryOver' | 'recruits'>,
  growth: number,
  from: number,
  to: number,
): number {
  let share = from;
  for (let step = 0; share < to; step++) {
    const next = carryOver * share + (1 - carryOver * share) * (1 - exp(-recruits * growth * share));
    if (!(next > share * (1 + leastGain))) return Infinity;
    if (next >= to) return (step + log(to / share) / log(next / share)) * years;
    share = next;
  }
  return 0;
}

/** Growth in a step below which the share stands still. */
const leastGain = 1e-9;
