import { exp } from '#sim-core/numeric/exp.ts';
import type { StepRates } from './step-rates.ts';

/**
 * Share u of its capacity at which ground of vigour g settles without losses: the positive root of
 * u = σ_Δ u + (1 − σ_Δ u)(1 − e^(−βgu)), by bisection; 0 where there is none (σ_Δ + βg ≤ 1: nothing grows from little).
 */
export function referenceShare(rates: Pick<StepRates, 'carryOver' | 'recruits'>, vigour: number): number {
  const { carryOver, recruits } = rates;
  if (carryOver + recruits * vigour <= 1) return 0;
  // What one step adds to u, over u: above 0 below the root, below 0 above it.
  const gain = (u: number) => carryOver * u + (1 - carryOver * u) * (1 - exp(-recruits * vigour * u)) - u;
  let low = 1e-12;
  let high = 1;
  if (gain(low) <= 0) return 0;
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (gain(middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** `referenceShare` of each vigour that 8 bits can hold, Float64, 256 values. */
export const referenceShares = (rates: Pick<StepRates, 'carryOver' | 'recruits'>): Float64Array =>
  Float64Array.from({ length: 256 }, (_, byte) => referenceShare(rates, byte / 255));
