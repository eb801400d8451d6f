import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';

/** The yearly rates of spread as they act in one step. */
export interface StepRates {
  /** Δt, yr */
  readonly years: number;
  /** σ_Δ = σ^Δt: share of standing clumps that persist a step without being re-issued */
  readonly carryOver: number;
  /** β = e^(rΔt) − σ_Δ: recruits a step and unit of cover, at low density on good ground */
  readonly recruits: number;
  /** ε Δt */
  readonly seedlings: number;
}

/** σ_Δ, β and εΔt of a step of 1/stepsPerYear. */
export function stepRates(
  rates: Pick<Rates, 'carryOver' | 'fillRate' | 'seedlingRate'>,
  stepsPerYear: number,
): StepRates {
  const years = 1 / stepsPerYear;
  const carryOver = rates.carryOver > 0 ? exp(log(rates.carryOver) * years) : 0;
  return {
    years,
    carryOver,
    recruits: exp(rates.fillRate * years) - carryOver,
    seedlings: rates.seedlingRate * years,
  };
}
