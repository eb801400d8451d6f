import { formatCounted, formatNumber, formatShare } from '#contract/formats.ts';
import type { ComparedOutlook } from '#contract/comparisons.ts';
import type { ExpectedLoss, Trend } from '#sim-core/spec/outlook-changes.ts';
import { weatherInWords } from './weather-words.ts';

/** All that an outlook brings, in sentences: its weather, how that changes, and the losses that it expects. */
export function outlookInWords(outlook: Omit<ComparedOutlook, 'name'>, surveyYear: number): string {
  const { droughtIndex, trend, losses = [], grazing = true } = outlook;
  return [
    weatherInWords(droughtIndex, surveyYear),
    trend && trendInWords(trend),
    losses.length > 0 && `Whatever the option, it expects ${losses.map(lossInWords).join('; ')}.`,
    !grazing && 'Grazers stay away.',
  ]
    .filter(Boolean)
    .join(' ');
}

function trendInWords({ shiftPerDecade = 0, frequencyPerDecade = 1 }: Trend): string {
  const parts = [
    shiftPerDecade !== 0 &&
      `every decade the index moves by ${formatNumber(shiftPerDecade)} (${shiftPerDecade < 0 ? 'drier' : 'wetter'})`,
    frequencyPerDecade !== 1 &&
      `every decade droughts begin ${formatNumber(frequencyPerDecade)} times as often`,
  ].filter((part): part is string => part !== false);
  return parts.length === 0 ? '' : `From the survey on ${parts.join(' and ')}.`;
}

function lossInWords(loss: ExpectedLoss): string {
  const what = `a loss of ${formatShare(loss.share)} of the cover${loss.area ? ' of an area' : ''}`;
  if ('year' in loss) return `${what} in ${loss.year}`;
  const span =
    loss.from === undefined && loss.until === undefined
      ? 'in any year'
      : `${loss.from === undefined ? '' : `from ${loss.from} `}${loss.until === undefined ? 'on' : `to ${loss.until}`}`;
  return `${what} ${span} with a chance of ${formatShare(loss.chance)} a year (${formatCounted(Math.round(1 / loss.chance), 'year')} apart on average)`;
}
