import { formatNumber } from '#app/lib/formats.ts';
import type { ExpectedLoss, Trend } from '#sim-core/spec/outlook-changes.ts';

/** `0.3 drier each decade, droughts 1.2 times as often` */
export function trendWords({ shiftPerDecade = 0, frequencyPerDecade = 1 }: Trend): string {
  const parts = [
    ...(shiftPerDecade === 0
      ? []
      : [`${formatNumber(Math.abs(shiftPerDecade))} ${shiftPerDecade < 0 ? 'drier' : 'wetter'} each decade`]),
    ...(frequencyPerDecade === 1
      ? []
      : [`droughts ${formatNumber(frequencyPerDecade)} times as often after each decade`]),
  ];
  return parts.length > 0 ? parts.join(', ') : 'none';
}

/** `30 % of the site in 2034`, `50 % of an area with a chance of 5 % a year` */
export function lossWords(loss: ExpectedLoss): string {
  const what = `${formatNumber(100 * loss.share)} % of ${loss.area ? 'an area' : 'the site'}`;
  if ('year' in loss) return `${what} in ${loss.year}`;
  const span = [
    ...(loss.from === undefined ? [] : [`from ${loss.from}`]),
    ...(loss.until === undefined ? [] : [`to ${loss.until}`]),
  ];
  return [`${what} with a chance of ${formatNumber(100 * loss.chance)} % a year`, ...span].join(' ');
}
