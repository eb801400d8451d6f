import { wilsonInterval } from '#sim-core/ensemble/proportion.ts';
import { of100 } from './chance-words.ts';
import type { OutlookFigures, Pair } from './comparison-figures.ts';

/** With fewer futures than this chances are told with a warning (common practice, no source). */
export const fewFutures = 30;

/** Whether the 95 % interval of a pair's difference leaves out no difference at all. */
export const toldApart = ({ sooner }: Pair): boolean => sooner.low > 0 || sooner.high < 0;

/** `A`, `A and B`, `A, B and C`. */
export const listed = (words: readonly string[]): string =>
  words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words[words.length - 1]}`;

/**
 * What can and what cannot be told apart, for people who decide: which option recovers soonest, which others might as
 * well, and how the options stand to Wait. Undefined before there are pairs.
 */
export function summaryWords({ options, pairs, replicates }: OutlookFigures): string | undefined {
  if (pairs.length === 0) return undefined;
  const name = (i: number) => `“${options[i].name}”`;
  const names = (places: readonly number[]) => listed(places.map(name));
  const places = options.map((_, i) => i);
  const best = places.reduce((lead, i) => (options[i].yearsSooner > options[lead].yearsSooner ? i : lead), 0);
  const pairOf = (a: number, b: number) =>
    pairs.find(({ first, second }) => (first === a && second === b) || (first === b && second === a));
  const apart = (a: number, b: number) => {
    const pair = pairOf(a, b);
    return pair !== undefined && toldApart(pair);
  };
  const level = places.filter((i) => i !== best && !apart(i, best));
  const lead =
    level.length === 0
      ? `${name(best)} clearly recovers sooner than ${options.length > 2 ? 'every other option' : name(1 - best)}.`
      : level.length === options.length - 1
        ? `No option can be told from the others by ${replicates} futures: whichever recovers soonest may be so by chance.`
        : `${names([best, ...level])} recover soonest, and ${replicates} futures cannot tell ${level.length > 1 ? 'them' : 'the two'} apart.`;
  const wait = options.findIndex((option) => option.wait);
  const acting = places.filter((i) => i !== wait);
  if (wait < 0 || level.length === options.length - 1) return lead;
  // Of one that leads for sure, and of all where Wait does, it is said already.
  const said = (i: number) => level.length === 0 && (i === best || best === wait);
  const sooner = acting.filter((i) => apart(i, wait) && options[i].yearsSooner > 0 && !said(i));
  const later = acting.filter((i) => apart(i, wait) && options[i].yearsSooner < 0 && !said(i));
  const like = acting.filter((i) => !apart(i, wait));
  const beside = [
    sooner.length > 0 &&
      `${names(sooner)} clearly recover${sooner.length === 1 ? 's' : ''} sooner than ${name(wait)}`,
    later.length > 0 &&
      `${names(later)} clearly recover${later.length === 1 ? 's' : ''} later than ${name(wait)}`,
    like.length > 0 && `${names(like)} cannot be told from ${name(wait)}`,
  ].filter((words) => words !== false);
  return beside.length === 0 ? lead : `${lead} ${beside.join('; ')}.`;
}

/** A warning where chances rest on few futures, with what more of them would give; undefined where there are enough. */
export function fewFuturesWords({ options, replicates }: OutlookFigures): string | undefined {
  if (replicates === 0 || replicates >= fewFutures) return undefined;
  const more = 200;
  const half = ({ low, high }: { low: number; high: number }) => of100((high - low) / 2);
  const shares = options.flatMap(({ summary }) => summary.beforeDrought.share ?? []);
  const widest = shares.reduce((wide, share) => (half(share) > half(wide) ? share : wide), shares[0]);
  return `These are ${replicates} futures of each option: few. A chance is known to about ± ${half(widest)} of 100 only; ${more} futures would make that about ± ${half(wilsonInterval(Math.round(widest.estimate * more), more))}.`;
}
