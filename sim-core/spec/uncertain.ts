import { z } from 'zod';
import { allParameters, anyRateNames, processOf, type AnyRateName } from './all-parameters.ts';
import { beliefWithin, type Belief } from './belief.ts';
import type { FieldProblem } from './problems.ts';
import type { Processes } from './processes.ts';

/** What is believed of rates that are not known exactly, by rate; those of processes among them. */
export type Beliefs = { [name in AnyRateName]?: Belief };
/** Values of some rates, by rate. */
export type DrawnRates = { [name in AnyRateName]?: number };

/** Schema of beliefs: each about a rate that there is, within its range. */
export const beliefsSchema = z.strictObject(
  Object.fromEntries(anyRateNames.map((name) => [name, beliefWithin(allParameters[name]).optional()])),
) as unknown as z.ZodType<Beliefs, Beliefs>;

/** Schema of values of some rates, as a replicate drew them. */
export const drawnRatesSchema = z.strictObject(
  Object.fromEntries(anyRateNames.map((name) => [name, z.number().optional()])),
) as unknown as z.ZodType<DrawnRates, DrawnRates>;

/** Most draws that a Latin hypercube has. */
export const mostDraws = 10_000;

/** Rates that each replicate draws for itself, shared by all options of the same seed. */
export const uncertainSchema = z.strictObject({
  /** rows of the Latin hypercube: in as many replicates, each rate is drawn once from every part of its law */
  draws: z.number().int().min(1).max(mostDraws),
  rates: beliefsSchema,
});
export type Uncertain = z.infer<typeof uncertainSchema>;

/** What makes it impossible beside its processes, at its fields. */
export function uncertainProblems({ rates }: Uncertain, processes: Processes): FieldProblem[] {
  const named = anyRateNames.filter((name) => rates[name] !== undefined);
  if (named.length === 0)
    return [{ field: 'rates', message: 'Names no rate; leave "uncertain" out where every rate is fixed' }];
  return named.flatMap((name) => {
    const part = processOf(name);
    return part === undefined || processes[part]
      ? []
      : [
          {
            field: `rates.${name}`,
            message: `Belongs to ${part}, which are off; name them under "processes" or leave this out`,
          },
        ];
  });
}

/** The beliefs that such processes leave anything to: those about a process that is off drop out. Undefined of none. */
export function beliefsThatApply({ draws, rates }: Uncertain, processes: Processes): Uncertain | undefined {
  const left = Object.entries(rates).filter(([name]) => {
    const part = processOf(name as AnyRateName);
    return part === undefined || processes[part];
  });
  return left.length === 0 ? undefined : { draws, rates: Object.fromEntries(left) };
}
