import { formatNumber } from '#app/lib/formats.ts';
import type { Band } from './implied-draws.ts';

export type Verdict = 'agrees' | 'too low' | 'too high';

/** Whether what the rates imply meets what was measured: where the two ranges do not overlap, on which side. */
export function verdictOf({ low, high }: Band, measured: { value: number; plusMinus: number }): Verdict {
  // A kernel as it is cut is up to 2 % slower than the rate says, and a curve of years is read between two of them.
  const slack = 0.02 * measured.value;
  if (high < measured.value - measured.plusMinus - slack) return 'too low';
  return low > measured.value + measured.plusMinus + slack ? 'too high' : 'agrees';
}

/** The same in a sentence, for what is measured as a speed or as a time. */
export function verdictWords(
  band: Band,
  measured: { value: number; plusMinus: number },
  kind: 'speed' | 'time',
): string {
  const verdict = verdictOf(band, measured);
  const figure = (x: number) => (Number.isFinite(x) ? formatNumber(x, 3) : 'longer than 40');
  const implied =
    figure(band.low) === figure(band.high)
      ? figure(band.middle)
      : `${figure(band.low)} to ${figure(band.high)}`;
  if (verdict === 'agrees') return `Agrees: the rates imply ${implied}.`;
  const fast = kind === 'speed' ? verdict === 'too high' : verdict === 'too low';
  return `The rates are too ${fast ? 'fast' : 'slow'}: they imply ${implied}.`;
}
