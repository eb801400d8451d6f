import { useState, type ReactNode } from 'react';
import type { ComparisonPlan } from '#contract/comparisons.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';

const [rowWidth, height, middle] = [4, 84, 42];

/** Years that a future recovers before the drought, and where it stands in the strip. */
interface Lead {
  readonly years: number;
  readonly x: number;
}

/** What became of one future, in words. */
export function futureWords(record: ReplicateRecord, horizon: number): string {
  const { recoveredYear, droughtYear, lostYear } = record;
  const drought = droughtYear === null ? `no drought by ${horizon}` : `drought in ${droughtYear}`;
  if (recoveredYear === null) return `still open in ${horizon}, ${drought}`;
  const lost = lostYear === null ? '' : `, lost again in ${lostYear}`;
  return `recovered in ${Math.ceil(recoveredYear)}, ${drought}${lost}`;
}

/**
 * A line a future, in the order of how long before (above) or after (below) the next drought it recovered; dots where it
 * is open at the horizon. A future can be picked and read.
 */
export function FuturesLines(props: {
  plan: ComparisonPlan;
  name: string;
  records: readonly ReplicateRecord[];
  /** what can be done with the future that is picked */
  children?: (record: ReplicateRecord) => ReactNode;
}) {
  const { records, plan } = props;
  const { surveyYear, years } = plan.common;
  const horizon = surveyYear + years;
  /** number of the future, which stays picked when others come between */
  const [picked, setPicked] = useState<number>();
  const lead = ({ recoveredYear, droughtYear }: ReplicateRecord) =>
    recoveredYear === null ? -Infinity : (droughtYear ?? horizon + 1) - recoveredYear;
  const sorted = [...records].sort((a, b) => lead(b) - lead(a) || a.replicate - b.replicate);
  const place = sorted.findIndex(({ replicate }) => replicate === picked);
  const at = place < 0 ? undefined : sorted[place];
  const scale = (middle - 4) / years;
  const leads = sorted.map((record, i): Lead => ({ years: lead(record), x: i * rowWidth + 0.5 }));
  const bars = (some: readonly Lead[]) =>
    some
      .filter((each) => each.years !== -Infinity)
      .map((each) => {
        const size = Math.max(1, Math.abs(each.years) * scale);
        return `M${each.x} ${middle}h3v${(each.years > 0 ? -size : size).toFixed(1)}h-3z`;
      })
      .join('');
  const dots = (some: readonly Lead[]) => some.map(({ x }) => `M${x + 1.5} ${middle + 9}h0`).join('');
  const choose = (to: number) => setPicked(sorted[Math.min(sorted.length - 1, Math.max(0, to))]?.replicate);
  return (
    <div>
      <div
        role="slider"
        tabIndex={0}
        aria-label={`Futures of ${props.name}, from the one that closes longest before the next drought`}
        aria-valuemin={1}
        aria-valuemax={sorted.length}
        aria-valuenow={Math.max(0, place) + 1}
        aria-valuetext={at ? `Future ${at.replicate + 1}: ${futureWords(at, horizon)}` : 'none picked'}
        className="mb-2 cursor-pointer outline-offset-2"
        onKeyDown={(event) => {
          const moves: Record<string, number> = {
            ArrowLeft: -1,
            ArrowDown: -1,
            ArrowRight: 1,
            ArrowUp: 1,
            PageUp: 10,
            PageDown: -10,
          };
          if (event.key in moves) choose(at || moves[event.key] < 0 ? place + moves[event.key] : 0);
          else if (event.key === 'Home') choose(0);
          else if (event.key === 'End') choose(sorted.length - 1);
          else return;
          event.preventDefault();
        }}
        onPointerDown={(event) => {
          const box = event.currentTarget.getBoundingClientRect();
          choose(Math.floor(((event.clientX - box.left) / box.width) * sorted.length));
        }}
      >
        <svg
          viewBox={`0 0 ${sorted.length * rowWidth} ${height}`}
          preserveAspectRatio="none"
          className="block h-[84px] w-full"
          aria-hidden="true"
        >
          <path
            d={`M0 ${middle}H${sorted.length * rowWidth}`}
            className="stroke-ink"
            vectorEffect="non-scaling-stroke"
          />
          <path d={bars(leads.filter((each) => each.years > 0))} className="fill-ink" />
          <path d={bars(leads.filter((each) => each.years <= 0))} className="fill-shore" />
          {/* A line of no length with round ends stays a dot, however wide a future is drawn. */}
          <path
            d={dots(leads.filter(({ years }) => years === -Infinity))}
            className="stroke-ink-2"
            strokeWidth={4}
            strokeLinecap="round"
            vectorEffect="non-scaling-stroke"
          />
          {at && leads[place].years === -Infinity ? (
            <path
              d={dots([leads[place]])}
              className="stroke-flag"
              strokeWidth={8}
              strokeLinecap="round"
              vectorEffect="non-scaling-stroke"
            />
          ) : (
            at && <path d={bars([leads[place]])} className="fill-flag" />
          )}
        </svg>
      </div>
      <p className="min-h-9 text-note text-ink-2" aria-live="polite">
        {at ? (
          <>
            Future {at.replicate + 1}: {futureWords(at, horizon)}. {props.children?.(at)}
          </>
        ) : (
          'Above the line: closed before the next drought. Below: after it. Dots: still open. Press one to read it.'
        )}
      </p>
    </div>
  );
}
