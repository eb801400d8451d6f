import { parameters, type Parameter, type RateName } from './parameters.ts';
import {
  fragmentParameters,
  grazerParameters,
  type FragmentRates,
  type GrazerRates,
} from './process-parameters.ts';

/** Name of any rate: of the plant itself or of a process. No two tables share a name. */
export type AnyRateName = RateName | keyof GrazerRates | keyof FragmentRates;

/** The rates of all tables in one, in the order in which they are told. */
export const allParameters: Readonly<Record<AnyRateName, Parameter>> = {
  ...parameters,
  ...grazerParameters,
  ...fragmentParameters,
};

export const anyRateNames = Object.keys(allParameters) as AnyRateName[];

/** The process that a rate belongs to; undefined for a rate of the plant itself. */
export function processOf(name: AnyRateName): 'grazers' | 'fragments' | undefined {
  if (name in grazerParameters) return 'grazers';
  return name in fragmentParameters ? 'fragments' : undefined;
}
