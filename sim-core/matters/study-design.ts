import { beliefQuantile } from '#sim-core/belief/belief-quantile.ts';
import { uncertainNames } from '#sim-core/belief/rates-of-run.ts';
import { morrisTrajectories, type Trajectory } from '#sim-core/ensemble/morris.ts';
import { sobolDesign } from '#sim-core/ensemble/sobol.ts';
import { allParameters, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Beliefs, DrawnRates } from '#sim-core/spec/uncertain.ts';

export const studyMethods = ['one-at-a-time', 'screening', 'indices'] as const;
export type StudyMethod = (typeof studyMethods)[number];

/** What may matter: a rate, or the weather and chance of a future. */
export type StudyFactor = AnyRateName | 'luck';

export interface StudyInput {
  readonly method: StudyMethod;
  /** groups of runs: futures, walks or rows */
  readonly size: number;
  readonly seed: string;
  readonly rates: Beliefs;
  /** whether weather and chance count as a factor; else all runs share those of future 0 */
  readonly luck: boolean;
}

export interface StudyPoint {
  readonly rates: DrawnRates;
  readonly replicate: number;
}

/** The runs of a study. A larger one of the same seed begins with the runs of a smaller one. */
export interface StudyDesign {
  readonly method: StudyMethod;
  readonly factors: readonly StudyFactor[];
  /** group by group */
  readonly points: readonly StudyPoint[];
  /** points of a group: figures take groups as a whole */
  readonly groupSize: number;
  /** of screening */
  readonly walks: readonly Trajectory[];
}

/** Shares of what is believed at which one rate at a time is tried; the others stay at their medians. */
export const triedShares = [0.05, 0.25, 0.5, 0.75, 0.95] as const;
const [lowest, highest] = [triedShares[0], triedShares[4]];
/** Rows of a Latin hypercube: a study grows by whole ones. */
export const rowsOfBlock = 16;
const levels = 4;
/** Futures that a share of luck falls upon. */
const lucks = 0x1000000;

/** The runs that a study needs, in an order in which each group is complete before the next begins. */
export function studyDesign(input: StudyInput): StudyDesign {
  const names = uncertainNames(input);
  const quantiles = names.map((name) => beliefQuantile(input.rates[name]!, allParameters[name]));
  const ratesAt = (shares: ArrayLike<number>): DrawnRates =>
    Object.fromEntries(names.map((name, i) => [name, quantiles[i](shares[i])]));
  const factors: StudyFactor[] =
    input.luck && input.method !== 'one-at-a-time' ? [...names, 'luck'] : [...names];
  switch (input.method) {
    case 'one-at-a-time':
      return { ...oneAtATime(names.length, input.size, ratesAt), method: input.method, factors, walks: [] };
    case 'screening':
      return { ...screening(input, factors.length, ratesAt), method: input.method, factors };
    case 'indices':
      return { ...indices(input, factors.length, ratesAt), method: input.method, factors, walks: [] };
  }
}

type RatesAt = (shares: ArrayLike<number>) => DrawnRates;

function oneAtATime(factors: number, futures: number, ratesAt: RatesAt) {
  const middle = new Float64Array(factors).fill(0.5);
  const tried = [middle];
  for (let f = 0; f < factors; f++)
    for (const share of triedShares) if (share !== 0.5) tried.push(middle.with(f, share));
  const rates = tried.map(ratesAt);
  return {
    groupSize: tried.length,
    points: Array.from({ length: futures }, (_, replicate) =>
      rates.map((values) => ({ rates: values, replicate })),
    ).flat(),
  };
}

/** Walks over the middle nine tenths of what is believed, as a law may have no end. Each walk meets futures of its own. */
function screening({ seed, size, luck }: StudyInput, factors: number, ratesAt: RatesAt) {
  const drawn = morrisTrajectories(seed, factors, size, levels);
  const walks = luck
    ? // Another future is as far as any: its effect is a whole one.
      drawn.map((walk) => ({
        ...walk,
        moves: walk.moves.with(factors - 1, Math.sign(walk.moves[factors - 1])),
      }))
    : drawn;
  return {
    walks,
    groupSize: factors + 1,
    points: walks.flatMap(({ points }, w) =>
      points.map((point) => ({
        rates: ratesAt(point.map((share) => lowest + (highest - lowest) * share)),
        replicate: luck ? w * levels + Math.round(point[factors - 1] * (levels - 1)) : 0,
      })),
    ),
  };
}

function indices({ seed, size, luck }: StudyInput, factors: number, ratesAt: RatesAt) {
  const at = (shares: Float64Array): StudyPoint => ({
    rates: ratesAt(shares),
    replicate: luck ? Math.floor(shares[factors - 1] * lucks) : 0,
  });
  const points: StudyPoint[] = [];
  for (let block = 0, row = 0; row < size; block++) {
    const { a, b, mixed } = sobolDesign(`${seed}/${block}`, factors, rowsOfBlock);
    for (let r = 0; r < rowsOfBlock && row < size; r++, row++)
      points.push(at(a[r]), at(b[r]), ...mixed.map((rows) => at(rows[r])));
  }
  return { groupSize: factors + 2, points };
}
