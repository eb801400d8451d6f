import { NumberBlank } from '#app/components/number-blank.tsx';
import { mostFittedRates } from '#contract/fits.ts';
import { beliefQuantile } from '#sim-core/belief/belief-quantile.ts';
import { allParameters, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import { formatNumber } from '#app/lib/formats.ts';
import { fittableRates, priorOf, type FittedPlant } from './rate-prior.ts';

/** Rates that are fitted, with what is believed of each before where that is not the plant's. */
export type RateDraft = ReadonlyMap<AnyRateName, Belief | undefined>;

/** Which rates a fit asks about, and what is believed of them before. */
export function RateChoice(props: {
  plant: FittedPlant;
  draft: RateDraft;
  onChange: (draft: RateDraft) => void;
}) {
  const { plant, draft, onChange } = props;
  const toggle = (name: AnyRateName) => {
    const next = new Map(draft);
    if (!next.delete(name)) next.set(name, undefined);
    onChange(next);
  };
  return (
    <section aria-label="Rates to fit">
      <h2 className="text-lead">Which rates to fit</h2>
      <p className="mt-0.5 mb-2 max-w-[62ch] text-note text-ink-2">
        At most {mostFittedRates}; two or three is what a few surveys can tell apart. Before the fit a rate
        may be anything that the plant says is believed, or else lie anywhere in the range given here.
      </p>
      <ul>
        {fittableRates(plant).map((name) => {
          const { label, unit, min, max } = allParameters[name];
          const chosen = draft.has(name);
          const belief = draft.get(name) ?? priorOf(plant, name);
          const quantile = beliefQuantile(belief, allParameters[name]);
          const set = (low: number, high: number) =>
            onChange(new Map(draft).set(name, { law: 'uniform', low, high }));
          return (
            <li
              key={name}
              className="flex min-h-8 flex-wrap items-center gap-x-3 border-t border-rule-2 py-0.5 touch:min-h-11"
            >
              <label className="flex min-w-[190px] items-center gap-2 touch:min-h-11">
                <input
                  type="checkbox"
                  className="size-4 accent-ink"
                  checked={chosen}
                  disabled={!chosen && draft.size >= mostFittedRates}
                  onChange={() => toggle(name)}
                />
                {label}
              </label>
              {chosen &&
                (belief.law === 'uniform' ? (
                  <span className="text-[13.5px]">
                    from{' '}
                    <NumberBlank
                      label={`Lowest ${label.toLowerCase()}`}
                      value={belief.low}
                      least={min}
                      most={max}
                      onValue={(low) => set(low, belief.high)}
                    />{' '}
                    to{' '}
                    <NumberBlank
                      label={`Highest ${label.toLowerCase()}`}
                      value={belief.high}
                      least={min}
                      most={max}
                      onValue={(high) => set(belief.low, high)}
                    />{' '}
                    {unit !== '–' && unit}
                    {belief.low >= belief.high && (
                      <span className="text-danger"> The low end comes first.</span>
                    )}
                  </span>
                ) : (
                  <span className="text-[13.5px] text-ink-2">
                    as the plant says: nine tenths from {formatNumber(quantile(0.05), 3)} to{' '}
                    {formatNumber(quantile(0.95), 3)} {unit !== '–' && unit}
                  </span>
                ))}
            </li>
          );
        })}
      </ul>
    </section>
  );
}
