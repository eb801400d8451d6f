import { formatNumber, formatShare } from '#app/lib/formats.ts';
import type { GrazerRates } from '#sim-core/spec/process-parameters.ts';

/** What the rates of grazers come to in a year, so that they can be judged without a run. */
export function GrazersInWords({ rates }: { rates: GrazerRates }) {
  const { grazerGrowth, grazerMortality, predation, refugePredation, grazingRate, grazerLimit } = rates;
  const times = (rate: number) => `× ${formatNumber(Math.exp(rate))}`;
  return (
    <p className="border-t border-rule-2 pt-2.5 text-[13.5px]">
      On full stands their number changes by {times(grazerGrowth - grazerMortality - predation)} a year
      outside drought and by {times(grazerGrowth - grazerMortality)} at an index of −4, on a full refuge then
      by {times(grazerGrowth - grazerMortality - refugePredation)}. At their most, {formatNumber(grazerLimit)}{' '}
      on a square metre, they take {formatShare(1 - Math.exp(-grazingRate * grazerLimit))} of what stands
      there in a year.
    </p>
  );
}
