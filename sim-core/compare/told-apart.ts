import type { Interval } from '#sim-core/ensemble/proportion.ts';
import type { OutlookFigures, Pair } from './comparison-figures.ts';

/** Whether the 95 % interval of a difference leaves out no difference at all. */
export const leavesOutNone = ({ low, high }: Interval): boolean => low > 0 || high < 0;

/** Whether the years to recovery of a pair can be told apart. */
export const toldApart = ({ sooner }: Pair): boolean => leavesOutNone(sooner);

/** A difference of two options, first less second; undefined where there are too few futures for pairs. */
export function differenceOf(
  { pairs }: Pick<OutlookFigures, 'pairs'>,
  figure: 'sooner' | 'chanceGained',
  first: number,
  second: number,
): Interval | undefined {
  for (const pair of pairs) {
    const { estimate, low, high } = pair[figure];
    if (pair.first === first && pair.second === second) return { estimate, low, high };
    // From 0 on, so that nothing turns into −0.
    if (pair.first === second && pair.second === first)
      return { estimate: 0 - estimate, low: 0 - high, high: 0 - low };
  }
  return undefined;
}

/**
 * Values with those evened out that cannot be told apart: from the greatest down, each that cannot be told from the first
 * of its group takes the mean of the group.
 *
 * @param apart whether two options, by place, can be told apart
 */
export function levelValues(
  values: readonly number[],
  apart: (first: number, second: number) => boolean,
): number[] {
  const level = [...values];
  const order = values.map((_, i) => i).sort((a, b) => values[b] - values[a] || a - b);
  let group: number[] = [];
  const close = () => {
    const mean = group.reduce((sum, i) => sum + values[i], 0) / group.length;
    for (const i of group) level[i] = mean;
  };
  for (const i of order) {
    if (group.length > 0 && apart(group[0], i)) {
      close();
      group = [];
    }
    group.push(i);
  }
  if (group.length > 0) close();
  return level;
}
