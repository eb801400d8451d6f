import type { ClosingSummary } from '#sim-core/plan/closing-tally.ts';
import { quickLookLeavesOut } from '#sim-core/plan/quick-look.ts';
import { formatArea, formatShare } from '#app/lib/formats.ts';
import { bareClosing } from './bare-closing.ts';

/** When half, 80 and 90 % of the ground would have closed, by growth alone, and how much sooner than under Wait. */
export function ClosingMeter(props: {
  summary: ClosingSummary | undefined;
  wait: ClosingSummary | undefined;
  lastYear: number;
}) {
  const { lastYear } = props;
  const summary = props.summary && bareClosing(props.summary);
  const wait = props.wait && bareClosing(props.wait);
  return (
    <section aria-label="Quick look" className="mt-1">
      <div className="flex items-baseline justify-between gap-x-3">
        <h2 className="text-body font-bold">
          Expected closing{summary ? ` of ${formatArea(summary.bare)}` : ''}
        </h2>
        <span className="text-note text-ink-2">bare today; growth alone</span>
      </div>
      {summary && (
        <p className="text-note text-ink-2">
          Hectares of plants: bare ground counts by the share of it that the plant can cover there, so they
          are fewer than those of the ground.
        </p>
      )}
      {summary ? (
        <div role="status">
          <dl className="mt-0.5 grid grid-cols-3 gap-x-3">
            {summary.years.map(({ share, year }, i) => (
              <div key={share} className="flex flex-col-reverse justify-end">
                <dt className="text-note">
                  {share === 0.5 ? 'half' : formatShare(share)}
                  <span className="block text-ink-2">{wait && againstWait(year, wait.years[i].year)}</span>
                </dt>
                <dd className="-ml-px text-[28px] leading-[1.1] font-light tracking-[-0.02em]">
                  {year ?? <span className="text-body">after {lastYear}</span>}
                </dd>
              </div>
            ))}
          </dl>
        </div>
      ) : (
        <p role="status" className="busy-ticks py-2 text-note text-ink-2">
          Working out when growth arrives
        </p>
      )}
      <p className="mt-1 text-note text-ink-2">{quickLookLeavesOut}</p>
    </section>
  );
}

function againstWait(year: number | undefined, wait: number | undefined): string {
  if (year === undefined) return '';
  if (wait === undefined) return 'not by then under Wait';
  const sooner = wait - year;
  return sooner > 0 ? `${sooner} y before Wait` : 'as under Wait';
}
