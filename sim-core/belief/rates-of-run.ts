import { drawLatinHypercube } from '#sim-core/ensemble/latin-hypercube.ts';
import { stream } from '#sim-core/random/streams.ts';
import { allParameters, anyRateNames, processOf, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { Processes } from '#sim-core/spec/processes.ts';
import type { Beliefs, DrawnRates, Uncertain } from '#sim-core/spec/uncertain.ts';
import { beliefQuantile } from './belief-quantile.ts';

/** What decides the rates of a run: fields of its RunSpec. */
export interface RatesInput {
  readonly seed: string;
  readonly replicate: number;
  readonly rates: Rates;
  readonly processes: Processes;
  readonly uncertain?: Uncertain | undefined;
}

/** The rates that a run takes. */
export interface RatesOfRun {
  readonly rates: Rates;
  readonly processes: Processes;
  /** the uncertain ones among them, as drawn; empty where nothing is uncertain */
  readonly drawn: DrawnRates;
}

/**
 * The rates of one replicate: those that are uncertain as it draws them, the others as the spec says.
 *
 * Of N draws, replicate i takes row i mod N of block ⌊i/N⌋ of a Latin hypercube, so that every N replicates take each
 * rate once from every N-th part of what is believed of it. A rate draws from a stream of its own
 * (`parameters/<block>/<rate>`): all options and outlooks share what is drawn, and another rate that becomes uncertain
 * changes nothing in it.
 */
export function ratesOfRun({ seed, replicate, rates, processes, uncertain }: RatesInput): RatesOfRun {
  if (!uncertain) return { rates, processes, drawn: {} };
  const drawn = drawnBy(seed, uncertain, replicate);
  return { ...withRates({ rates, processes }, drawn), drawn };
}

/** What the first replicates of an ensemble of so many draws would draw, without a run: a Latin hypercube. */
export const latinDraws = (seed: string, draws: number, rates: Beliefs): DrawnRates[] =>
  Array.from({ length: draws }, (_, replicate) => drawnBy(seed, { draws, rates }, replicate));

function drawnBy(seed: string, { draws, rates }: Uncertain, replicate: number): DrawnRates {
  const block = Math.floor(replicate / draws);
  const drawn: DrawnRates = {};
  for (const name of uncertainNames({ rates }))
    drawn[name] = beliefQuantile(
      rates[name]!,
      allParameters[name],
    )(marginOf(seed, block, name, draws)[replicate % draws]);
  return drawn;
}

/** Names of the rates that are uncertain, in the order of the tables. */
export const uncertainNames = ({ rates }: Pick<Uncertain, 'rates'>): AnyRateName[] =>
  anyRateNames.filter((name) => rates[name] !== undefined);

/** The rates and processes with other values for some of them; a rate of a process that is off changes nothing. */
export function withRates(
  { rates, processes }: Pick<RatesOfRun, 'rates' | 'processes'>,
  values: DrawnRates,
): Pick<RatesOfRun, 'rates' | 'processes'> {
  const changed = (part: ReturnType<typeof processOf>) =>
    Object.fromEntries(Object.entries(values).filter(([name]) => processOf(name as AnyRateName) === part));
  const { grazers, fragments } = processes;
  return {
    rates: { ...rates, ...changed(undefined) },
    processes: {
      ...(grazers && { grazers: { ...grazers, ...changed('grazers') } }),
      ...(fragments && { fragments: { ...fragments, ...changed('fragments') } }),
    },
  };
}

/** Margins drawn of late, since each replicate needs one row of the same ones. */
const known = new Map<string, Float64Array>();
const mostKnown = 100;

/** The shares that the replicates of a block draw for one rate. */
function marginOf(seed: string, block: number, name: AnyRateName, draws: number): Float64Array {
  const key = `${draws}/${block}/${name}/${seed}`;
  const found = known.get(key);
  if (found) return found;
  const points = drawLatinHypercube(stream(seed, `parameters/${block}/${name}`), draws, 1);
  const margin = Float64Array.from(points, ([share]) => share);
  if (known.size >= mostKnown) known.clear();
  known.set(key, margin);
  return margin;
}
