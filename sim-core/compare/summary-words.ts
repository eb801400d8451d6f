import { wilsonInterval, type Interval } from '#sim-core/ensemble/proportion.ts';
import { of100 } from './chance-words.ts';
import type { OutlookFigures } from './comparison-figures.ts';
import { differenceOf, leavesOutNone } from './told-apart.ts';

/** With fewer futures than this chances are told with a warning (common practice, no source). */
export const fewFutures = 30;

/** `A`, `A and B`, `A, B and C`. */
export const listed = (words: readonly string[]): string =>
  words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words[words.length - 1]}`;

const oneDecimal = new Intl.NumberFormat('en-GB', { maximumFractionDigits: 1 });
const decimal = (value: number) => oneDecimal.format(value).replace('-', '−');

/** `1.3 years (0.9 to 1.8)`, of a difference that is told as more than nothing. */
const yearsOf = ({ estimate, low, high }: Interval): string => {
  const ends = [Math.abs(low), Math.abs(high)].sort((a, b) => a - b).map(decimal);
  return `${decimal(Math.abs(estimate))} years (${ends.join(' to ')})`;
};

/** Places of the option that recovers soonest on average and of those that cannot be told from it, the soonest first. */
export function soonest(figures: OutlookFigures): number[] {
  const { options } = figures;
  const places = options.map((_, i) => i);
  const best = places.reduce((lead, i) => (options[i].yearsSooner > options[lead].yearsSooner ? i : lead), 0);
  return [best, ...places.filter((i) => i !== best && !apartInYears(figures, i, best))];
}

function apartInYears(figures: OutlookFigures, first: number, second: number): boolean {
  const sooner = differenceOf(figures, 'sooner', first, second);
  return sooner !== undefined && leavesOutNone(sooner);
}

/**
 * What can and what cannot be told apart, for people who decide: which option recovers soonest and by how much, which
 * others might as well, how the options stand to Wait, and what that does to closing before the next drought. Undefined
 * before there are pairs.
 */
export function summaryWords(figures: OutlookFigures): string | undefined {
  const { options, pairs, replicates } = figures;
  if (pairs.length === 0) return undefined;
  const name = (i: number) => `“${options[i].name}”`;
  const names = (places: readonly number[]) => listed(places.map(name));
  const by = (first: number, second: number) => yearsOf(differenceOf(figures, 'sooner', first, second)!);
  const places = options.map((_, i) => i);
  const [best, ...level] = soonest(figures);
  const others = places.filter((i) => i !== best);
  const wait = options.findIndex((option) => option.wait);
  const lead =
    level.length === 0
      ? `${name(best)} recovers sooner than ${listed(others.map((i) => `${name(i)}, by ${by(best, i)}`))}.`
      : level.length === others.length
        ? `No option can be told from the others by ${replicates} futures: whichever recovers soonest may be so by chance.`
        : `${names([best, ...level])} recover soonest, and ${replicates} futures cannot tell ${level.length > 1 ? 'them' : 'the two'} apart.`;
  return [lead, besideWait(), inTimeWords(figures, wait)].filter(Boolean).join(' ');

  function besideWait(): string {
    if (wait < 0 || level.length === others.length) return '';
    // Of one that leads for sure, and of all where Wait does, it is said already.
    const acting = places.filter((i) => i !== wait && !(level.length === 0 && (i === best || best === wait)));
    const like = acting.filter((i) => !apartInYears(figures, i, wait));
    const beside = [
      ...acting
        .filter((i) => !like.includes(i))
        .map((i) => {
          const side = options[i].yearsSooner > 0 ? 'sooner' : 'later';
          return `${name(i)} recovers ${side} than ${name(wait)}, by ${by(i, wait)}`;
        }),
      ...(like.length > 0 ? [`${names(like)} cannot be told from ${name(wait)}`] : []),
    ];
    return beside.length === 0 ? '' : `${beside.join('; ')}.`;
  }
}

/** What the options do to closing before the next drought: against Wait, or of any pair where Wait is not among them. */
function inTimeWords(figures: OutlookFigures, wait: number): string {
  const { options, pairs } = figures;
  const told = pairs.filter(
    ({ second, chanceGained }) => (wait < 0 || second === wait) && leavesOutNone(chanceGained),
  );
  if (told.length === 0)
    return `No difference${wait < 0 ? '' : ` from “${options[wait].name}”`} in closing before the next drought can be told.`;
  const gains = told.map(({ first, second, chanceGained: { estimate, low, high } }) => {
    const ends = [Math.abs(low), Math.abs(high)].sort((a, b) => a - b).map(of100);
    const size = of100(Math.abs(estimate));
    return `“${options[first].name}” in ${size} ${estimate > 0 ? 'more' : 'fewer'} of 100 futures (${ends.join(' to ')}) than “${options[second].name}”`;
  });
  return `Before the next drought closes ${listed(gains)}.`;
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
