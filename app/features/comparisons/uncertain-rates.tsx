import { beliefWords } from '#contract/belief-words.ts';
import { allParameters, anyRateNames } from '#sim-core/spec/all-parameters.ts';
import type { Uncertain } from '#sim-core/spec/uncertain.ts';

/** Which rates the futures of a comparison draw, and from what is believed of them; or that all are fixed. */
export function UncertainRates({ uncertain }: { uncertain: Uncertain | undefined }) {
  if (!uncertain)
    return (
      <p className="border-b border-rule py-2 text-note text-ink-2">
        Rates are fixed: every future takes those of a single run, so chances know nothing of what is not
        known of them.
      </p>
    );
  const names = anyRateNames.filter((name) => uncertain.rates[name] !== undefined);
  return (
    <details className="border-b border-rule py-2 text-[13.5px]">
      <summary className="min-h-7 cursor-pointer touch:min-h-11">
        <b className="font-semibold">What is not known.</b> Each future draws{' '}
        {names.map((name) => allParameters[name].label.toLowerCase()).join(', ')}, the same for every option.
      </summary>
      <table className="mt-1 w-full max-w-[720px] border-collapse text-note">
        <thead>
          <tr>
            <th scope="col" className="py-0.5 pr-4 text-left font-semibold text-ink-2">
              rate
            </th>
            <th scope="col" className="py-0.5 text-left font-semibold text-ink-2">
              what is believed of it
            </th>
          </tr>
        </thead>
        <tbody>
          {names.map((name) => {
            const { label, symbol, unit } = allParameters[name];
            return (
              <tr key={name} className="border-t border-rule-2 align-top">
                <th scope="row" className="py-1 pr-4 text-left font-normal">
                  {label}, {symbol}
                </th>
                <td className="py-1">
                  {beliefWords(uncertain.rates[name]!)}
                  {unit === '–' ? '' : ` ${unit}`}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
      <p className="mt-1 text-note text-ink-2">
        {uncertain.draws} draws of a Latin hypercube; rates are drawn independently of each other.
      </p>
    </details>
  );
}
