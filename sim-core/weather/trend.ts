import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';
import type { Trend } from '#sim-core/spec/outlook-changes.ts';

/** Index units that a trend has added after some years. */
export const shiftAfter = ({ shiftPerDecade = 0 }: Trend, years: number): number =>
  (shiftPerDecade * years) / 10;

/** Two clocks: years, and the time in which droughts come back as often as at the survey. */
export interface DroughtClock {
  /** years from the survey at which that time is reached, Infinity where it never is */
  readonly yearsAt: (time: number) => number;
}

/**
 * The clock of droughts under a trend. Their rate after t years is f^(t/10) times that at the survey, so
 * τ(t) = (e^(at) − 1)/a with a = ln f / 10, and t(τ) = ln(1 + aτ)/a (time change of a renewal process; common practice,
 * no source). Before the survey both run alike. With f < 1, τ stays below −1/a: after that no drought comes.
 */
export function droughtClock({ frequencyPerDecade = 1 }: Trend): DroughtClock {
  const a = log(frequencyPerDecade) / 10;
  if (a === 0) return { yearsAt: (time) => time };
  return {
    yearsAt: (time) => {
      if (time <= 0) return time;
      const grown = 1 + a * time;
      return grown > 0 ? log(grown) / a : Infinity;
    },
  };
}

/** How many times as often droughts begin after some years. */
export const frequencyAfter = ({ frequencyPerDecade = 1 }: Trend, years: number): number =>
  exp((log(frequencyPerDecade) * years) / 10);
