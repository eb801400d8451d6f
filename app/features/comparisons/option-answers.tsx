import type { ReactNode } from 'react';
import { FlagSymbol } from '#app/components/symbols.tsx';
import { HundredRule } from '#app/components/hundred-rule.tsx';
import { formatMoney } from '#contract/format-money.ts';
import { formatNumber } from '#app/lib/formats.ts';
import { chanceSentence, of100 } from '#sim-core/compare/chance-words.ts';
import type { OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { Chosen } from './chosen.tsx';

/** What each option comes to: the chance as a sentence and a rule of 100 futures, time, and how often it is best. */
export function OptionAnswers(props: {
  figures: OutlookFigures;
  currency: string | null;
  /** place of the option that was decided for */
  chosen: number | undefined;
  /** more of an option, by its place */
  children: (option: number) => ReactNode;
}) {
  const { options } = props.figures;
  const columns = options.length === 3 ? 'xl:grid-cols-3' : options.length === 4 ? 'xl:grid-cols-4' : '';
  const most = Math.max(...options.map(({ summary }) => summary.beforeDrought.share?.estimate ?? 0));
  return (
    <div className="py-4">
      <div className={`grid gap-x-8 gap-y-6 md:grid-cols-2 ${columns}`}>
        {options.map((option, i) => {
          const { share } = option.summary.beforeDrought;
          if (!share) return null;
          const { medianTime, restrictedMean } = option.summary;
          return (
            <section key={option.name} aria-label={option.name} className="min-w-0">
              <div className="flex items-baseline justify-between gap-3">
                <h2 className="flex min-w-0 items-baseline gap-2 text-lead font-bold">
                  {!option.wait && <FlagSymbol />}
                  <span className="min-w-0 break-words">
                    {option.name}
                    {i === props.chosen && <Chosen />}
                  </span>
                </h2>
                {option.cost !== null && props.currency && (
                  <span className="tabular-nums">{formatMoney(option.cost, props.currency)}</span>
                )}
              </div>
              <p className="sr-only">{chanceSentence(option.summary.beforeDrought)}</p>
              <p aria-hidden="true" className="flex items-center gap-2">
                <span>In</span>
                <span
                  className={`text-answer tabular-nums ${share.estimate === most ? 'font-bold' : 'font-light'}`}
                >
                  {of100(share.estimate)}
                </span>
                <span className="leading-snug">
                  of 100 futures this closes before the next drought{' '}
                  <span className="text-ink-2">
                    ({of100(share.low)} to {of100(share.high)})
                  </span>
                </span>
              </p>
              <HundredRule chance={share} />
              <p className="mt-1.5 text-note text-ink-2">
                {medianTime === undefined
                  ? 'More than half of the futures are still open at the horizon'
                  : `Half recover within ${formatNumber(medianTime, 0)} years`}
                {restrictedMean &&
                  `; ${formatNumber(restrictedMean.estimate, 1)} years on average, cut at the horizon`}
                . Best of these options in {of100(option.best.estimate)} of 100 ({of100(option.best.low)} to{' '}
                {of100(option.best.high)}). {option.summary.replicates} futures run
                {option.summary.beforeDrought.neither > 0 &&
                  `; in ${option.summary.beforeDrought.neither} neither came by the horizon, counted as not in time`}
                .
              </p>
              <div className="mt-2">{props.children(i)}</div>
            </section>
          );
        })}
      </div>
      <p className="mt-3 max-w-[92ch] text-note text-ink-2">
        “Half recover within” is the middle future: as many are faster as are slower. “On average” counts how
        long the slow ones take, with those still open at the horizon as if they recovered then; where it lies
        well above the half, a few very slow futures are the risk.
      </p>
    </div>
  );
}
