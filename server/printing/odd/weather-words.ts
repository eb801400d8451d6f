import type { WaitingLaw, WeatherSource } from '#sim-core/spec/weather-source.ts';
import { formatCounted, formatNumber } from '#contract/formats.ts';

/** What a year hands on to the next in Palmer's recursion: 0.897 a month. */
const palmerYear = 0.897 ** 12;

/** An outlook's weather in a sentence. Drought indices are on the Palmer scale, negative is dry. */
export function weatherInWords(source: WeatherSource, surveyYear: number): string {
  if (typeof source === 'number')
    return `A drought index of ${formatNumber(source)} in every step of every future.`;
  if (Array.isArray(source))
    return `A list of ${formatCounted(source.length, 'drought index', 'drought indices')} from ${surveyYear + 1} on, the same in every future; the driest is ${formatNumber(Math.min(...source))}.`;
  switch (source.kind) {
    case 'series': {
      const years = source.values.map(({ year }) => year);
      const span = `${Math.min(...years)} to ${Math.max(...years)}`;
      return source.order === 'dated'
        ? `A record from ${span}, each year as it is dated, the same in every future.`
        : `A record from ${span}, which each future reads on from a year of its own, beginning again at its end.`;
    }
    case 'palmer-type':
      return `Weather that remembers: each year keeps ${formatNumber(source.memory ?? palmerYear, 3)} of the last and adds chance; mean ${formatNumber(source.mean ?? 0)}, standard deviation ${formatNumber(source.standardDeviation)}, drawn by each future.`;
    case 'renewal':
      return `Droughts that come back, drawn by each future: from the beginning of one to the next ${lawInWords(source.returnInterval)}, the latest ${formatCounted(source.sinceLatest, 'year')} before the end of ${surveyYear}; each lasts ${lawInWords(source.length)} at an index of ${formatNumber(source.depth)}${source.depthSpread ? ` ± ${formatNumber(source.depthSpread)}` : ''}, and between them it is ${formatNumber(source.between ?? 0)}.`;
  }
}

function lawInWords(law: WaitingLaw): string {
  switch (law.law) {
    case 'fixed':
      return `${formatCounted(law.years, 'year')} always`;
    case 'exponential':
      return `${formatNumber(law.mean)} years on average (exponential)`;
    case 'weibull':
      return `a Weibull time of shape ${formatNumber(law.shape)} and scale ${formatNumber(law.scale)} years`;
    case 'gamma':
      return `a gamma time of shape ${formatNumber(law.shape)} and scale ${formatNumber(law.scale)} years`;
  }
}
