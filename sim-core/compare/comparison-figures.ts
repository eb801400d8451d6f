import { ensembleTally, type EnsembleSummary } from '#sim-core/ensemble/ensemble-tally.ts';
import { firstToCome } from '#sim-core/ensemble/next-drought.ts';
import { bestShares, type BestShare } from './best-option.ts';
import { efficientLine } from './efficient-options.ts';
import { sharedReplicates, type KnownRecords } from './known-records.ts';
import { meanDifference, pairedDifference, type PairedDifference } from './paired-difference.ts';
import { recoveryTimes, type ComparedYears } from './recovery-times.ts';
import { regretTable, type RegretTable } from './regret.ts';

/** What the figures need of a comparison's plan. */
export interface ComparedPlan extends ComparedYears {
  readonly options: readonly {
    readonly name: string;
    readonly wait: boolean;
    /** null where no costs are set */
    readonly cost: number | null;
  }[];
  readonly outlooks: readonly { readonly name: string }[];
}

export type LossCause = 'drought' | 'background' | 'grazing' | 'events';

/** What one option comes to under one outlook, over the replicates that all options have. */
export interface OptionFigures {
  readonly name: string;
  readonly wait: boolean;
  /** null where no costs are set */
  readonly cost: number | null;
  /** recovery curve, median, restricted mean, chance before the next drought, fan of cover */
  readonly summary: EnsembleSummary;
  /** replicates that recovered and fell below the target again */
  readonly lostAgain: number;
  /** mean covered area lost in a replicate, m² */
  readonly lost: Readonly<Record<LossCause, number>>;
  readonly best: BestShare;
  /** mean years to recovery less than Wait's, cut at the horizon: what is gained; 0 without Wait */
  readonly yearsSooner: number;
}

/** Two options under the same luck. */
export interface Pair {
  /** places in the plan */
  readonly first: number;
  readonly second: number;
  /** years that the first recovers sooner than the second, cut at the horizon */
  readonly sooner: PairedDifference;
  /** what the first's chance to close before the next drought is above the second's, share of all replicates */
  readonly chanceGained: PairedDifference;
}

export interface OutlookFigures {
  readonly name: string;
  readonly replicates: number;
  readonly options: readonly OptionFigures[];
  /** every option against Wait, then the others against each other; none of fewer than two replicates */
  readonly pairs: readonly Pair[];
  /** places of the efficient options by cost and years gained, cheap to dear; empty where a cost is missing */
  readonly efficient: readonly number[];
}

export interface ComparisonFigures {
  readonly outlooks: readonly OutlookFigures[];
  /** chances to close in time across outlooks; undefined of one outlook, or before there are replicates */
  readonly regret: RegretTable | undefined;
}

/** Chances that differ by no more than this are near. */
export const nearChance = 0.05;

/** All figures of a comparison from what is known of its replicates. */
export function comparisonFigures(plan: ComparedPlan, known: KnownRecords, seed: string): ComparisonFigures {
  const shared = sharedReplicates(known);
  if (shared.length === 0) return { outlooks: [], regret: undefined };
  const outlooks = plan.outlooks.map((_, outlook) => outlookFigures(plan, known, outlook, shared, seed));
  const chances = plan.options.map((_, option) =>
    outlooks.map((figures) => figures.options[option].summary.beforeDrought.share?.estimate ?? 0),
  );
  return { outlooks, regret: outlooks.length > 1 ? regretTable(chances, nearChance) : undefined };
}

function outlookFigures(
  plan: ComparedPlan,
  known: KnownRecords,
  outlook: number,
  shared: readonly number[],
  seed: string,
): OutlookFigures {
  const times = plan.options.map((_, option) => recoveryTimes(plan, known[option][outlook], shared));
  const inTime = plan.options.map((_, option) => closedInTime(known[option][outlook], shared));
  const best = bestShares(times);
  const wait = plan.options.findIndex((option) => option.wait);
  const options = plan.options.map((option, i): OptionFigures => ({
    name: option.name,
    wait: option.wait,
    cost: option.cost,
    ...ensembleFigures(plan, known[i][outlook], shared),
    best: best[i],
    yearsSooner: wait < 0 ? 0 : meanDifference(times[wait], times[i]),
  }));
  const order = plan.options.map((_, i) => i).sort((a, b) => Number(b === wait) - Number(a === wait));
  const pairs = order.flatMap((second, place) => order.slice(place + 1).map((first) => ({ first, second })));
  return {
    name: plan.outlooks[outlook].name,
    replicates: shared.length,
    options,
    pairs:
      shared.length < 2
        ? []
        : pairs.map(({ first, second }) => ({
            first,
            second,
            sooner: pairedDifference(times[second], times[first], `${seed}/${outlook}`),
            chanceGained: pairedDifference(inTime[first], inTime[second], `${seed}/${outlook}/in time`),
          })),
    efficient: options.some((option) => option.cost === null)
      ? []
      : efficientLine(options.map(({ cost, yearsSooner }) => ({ cost: cost ?? 0, gain: yearsSooner }))),
  };
}

/** 1 for each replicate that closes before the next drought, 0 for the others, in their order. */
const closedInTime = (records: KnownRecords[number][number], replicates: readonly number[]): Float64Array =>
  Float64Array.from(replicates, (replicate) => {
    const { recoveredYear, droughtYear } = records.get(replicate)!;
    return firstToCome(recoveredYear, droughtYear) === 'recovery' ? 1 : 0;
  });

function ensembleFigures(
  { common: { surveyYear, years } }: ComparedPlan,
  records: KnownRecords[number][number],
  shared: readonly number[],
) {
  const used = shared.map((replicate) => records.get(replicate)!);
  const mostArea = Math.max(...used.map((record) => Math.max(...record.coveredArea)));
  const tally = ensembleTally({ surveyYear, years, mostArea });
  for (const record of used) tally.add(record);
  const meanLost = (cause: LossCause) => used.reduce((sum, r) => sum + r.lost[cause], 0) / used.length;
  return {
    summary: tally.summary(),
    lostAgain: used.filter((record) => record.lostYear !== null).length,
    lost: {
      drought: meanLost('drought'),
      background: meanLost('background'),
      grazing: meanLost('grazing'),
      events: meanLost('events'),
    },
  };
}
