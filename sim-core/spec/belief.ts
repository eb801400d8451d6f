import { z } from 'zod';
import { beliefProblems } from '#sim-core/belief/belief-problems.ts';
import type { Parameter } from './parameters.ts';

/** Most values that a belief may be pasted from. */
export const mostBeliefValues = 2000;

const number = z.number().min(-1e9).max(1e9);
const shape = z.number().min(0.1).max(1000);

/**
 * What is believed of a rate that is not known exactly, as a law of its values in the rate's unit. Where a law would
 * reach beyond the rate's range (normal and log-normal always would), it is cut there and scaled to sum to 1 again.
 */
export const beliefSchema = z.discriminatedUnion('law', [
  z.strictObject({ law: z.literal('uniform'), low: number, high: number }),
  z.strictObject({ law: z.literal('triangular'), low: number, mode: number, high: number }),
  z.strictObject({ law: z.literal('normal'), mean: number, standardDeviation: z.number().gt(0).max(1e9) }),
  /** its logarithm is normal: two thirds of it lie between median ÷ factor and median × factor */
  z.strictObject({
    law: z.literal('log-normal'),
    median: z.number().gt(0).max(1e9),
    factor: z.number().gt(1).max(1000),
  }),
  /** on low..high; alpha and beta above 1 give a hump, equal ones a symmetric law */
  z.strictObject({ law: z.literal('beta'), alpha: shape, beta: shape, low: number, high: number }),
  /** measured or fitted values, in any order; what lies between two neighbours is as likely as they are close */
  z.strictObject({ law: z.literal('values'), values: z.array(number).min(2).max(mostBeliefValues) }),
]);
export type Belief = z.infer<typeof beliefSchema>;
export type BeliefLaw = Belief['law'];
export const beliefLaws = ['uniform', 'triangular', 'normal', 'log-normal', 'beta', 'values'] as const;

/** Schema of a belief about a rate: what it says lies within the rate's range. */
export const beliefWithin = (
  rate: Pick<Parameter, 'label' | 'min' | 'max' | 'unit'>,
): z.ZodType<Belief, Belief> =>
  beliefSchema.superRefine((belief, context) => {
    for (const { field, message } of beliefProblems(belief, rate))
      context.addIssue({ code: 'custom', path: field === '' ? [] : field.split('.'), message });
  });
