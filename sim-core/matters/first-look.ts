import { uncertainNames } from '#sim-core/belief/rates-of-run.ts';
import type { AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';
import { rankInfluence, type RankInfluence } from './rank-influence.ts';
import { measureOf, type StudyMeasure } from './study-measure.ts';

/** What the futures of a comparison tell of the rates that they drew, without another run. */
export interface FirstLook {
  readonly futures: number;
  /** futures that had not recovered by the horizon: they share the last rank */
  readonly cut: number;
  readonly rates: readonly (RankInfluence & { readonly name: AnyRateName })[];
  /** share of the ranks' variance that the rates explain; the rest is weather, chance and what no rank shows */
  readonly explained: number;
}

/**
 * Rank correlations of a measure, or of its difference between two options over futures that share their luck.
 *
 * @param second less which option; undefined for one option alone
 * @returns undefined where there are too few futures, or nothing ever changes
 */
export function firstLook(
  first: ReadonlyMap<number, ReplicateRecord>,
  second: ReadonlyMap<number, ReplicateRecord> | undefined,
  rates: Beliefs,
  measure: StudyMeasure,
  span: { surveyYear: number; years: number },
): FirstLook | undefined {
  const names = uncertainNames({ rates });
  const shared = [...first.values()].flatMap((a) => {
    const b = second?.get(a.replicate);
    return second && !b ? [] : [{ a, b }];
  });
  const found = rankInfluence(
    names.map((name) => shared.map(({ a }) => a.drawn[name] ?? NaN)),
    shared.map(({ a, b }) => measureOf(a, measure, span) - (b ? measureOf(b, measure, span) : 0)),
  );
  return (
    found && {
      futures: shared.length,
      cut: shared.filter(({ a, b }) => a.recoveredYear === null || b?.recoveredYear === null).length,
      rates: names.map((name, i) => ({ name, ...found.factors[i] })),
      explained: found.explained,
    }
  );
}
