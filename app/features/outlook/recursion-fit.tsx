import { useState } from 'react';
import { Button } from '#app/components/button.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import type { PalmerRecursion } from '#sim-core/spec/weather-source.ts';
import { fewestPairs, recursionOf, type RecursionFit } from '#sim-core/weather/fit-recursion.ts';
import { memoryOver } from '#sim-core/weather/palmer-recursion.ts';
import type { YearIndex } from '#sim-core/weather/yearly-record.ts';
import { IndexHistogram } from './index-histogram.tsx';
import { useWeatherWork } from './use-weather-work.ts';

const signed = (x: number) => formatNumber(x).replace('-', '−');

/** A recursion fitted to the record: its figures, how what it draws looks beside the record, and what it leaves over. */
export function RecursionFitView(props: {
  years: readonly YearIndex[];
  fit: RecursionFit | undefined;
  onUse: ((weather: PalmerRecursion) => void) | undefined;
}) {
  const { years, fit } = props;
  const [unbiased, setUnbiased] = useState(false);
  const weather = fit && recursionOf(fit, unbiased);
  const drawn = useWeatherWork(
    'drawnFutures',
    weather && [
      {
        surveyYear: 0,
        years: Math.min(500, years.length),
        stepsPerYear: 1,
        droughtIndex: { kind: 'palmer-type', ...weather },
      },
      [],
      400,
    ],
  );
  if (!fit || !weather)
    return (
      <p className="mt-3 text-[13.5px]">
        Not fitted: it takes {fewestPairs} pairs of years that follow each other, an index that changes, and a
        memory below 1. This record does not have that.
      </p>
    );
  const [low, high] = fit.memoryInterval;
  const futures = drawn?.answer;
  return (
    <div className="mt-3 text-[13.5px]">
      <p>
        A year hands on <b>{signed(fit.memory)}</b> of its index ({signed(low)} to {signed(high)}, 95 %),
        around a mean of <b>{signed(fit.mean)}</b>; what is new in a year spreads by {formatNumber(fit.noise)}
        , the index over many years by <b>{formatNumber(fit.standardDeviation)}</b>. By conditional least
        squares from {fit.pairs} pairs of years. Palmer’s own memory, 0.897 a month, leaves{' '}
        {formatNumber(memoryOver(1))} of a year.
      </p>
      <label className="mt-1 inline-flex min-h-7 cursor-pointer items-center gap-2 touch:min-h-11">
        <input
          type="checkbox"
          className="size-4 accent-ink"
          checked={unbiased}
          onChange={(event) => setUnbiased(event.target.checked)}
        />
        <span>
          Take out the bias of a short record: {signed(fit.memoryUnbiased)} (plus (1 + 3φ)/n, Kendall 1954)
        </span>
      </label>
      {fit.memory < 0 && (
        <p>
          A memory below 0 is not drawn: it is taken as none, so that a dry year says nothing about the next.
        </p>
      )}
      <div className="mt-3 grid gap-6 md:grid-cols-2">
        <Autocorrelation fit={fit} memory={weather.memory ?? 0} />
        {futures ? (
          <IndexHistogram
            record={years.map(({ index }) => index)}
            drawn={futures.examples.flat()}
            label="How often each index comes: bars on record, line as drawn"
          />
        ) : (
          <LoadingLines label="Drawing futures to set beside the record" />
        )}
      </div>
      {futures && <RecordInBand years={years} band={futures.band} />}
      <p className="mt-2">
        {fit.leftOverChance < 0.05
          ? `What it leaves over is correlated (Ljung–Box, chance ${formatNumber(fit.leftOverChance, 3)}): the record remembers in another way than this recursion does. Read the record on from a drawn year instead, or take droughts that come back.`
          : `What it leaves over looks like chance alone (Ljung–Box, chance ${formatNumber(fit.leftOverChance)}).`}
      </p>
      {props.onUse && (
        <Button kind="primary" className="mt-3" onClick={() => props.onUse?.(weather)}>
          Use this fit
        </Button>
      )}
    </div>
  );
}

/** Correlation with earlier years on record, and what the recursion would give: φ, φ² … */
function Autocorrelation({ fit, memory }: { fit: RecursionFit; memory: number }) {
  const lags = fit.autocorrelation.length;
  const sure = 1.96 / Math.sqrt(fit.pairs + 1);
  const y = (r: number) => 50 - 48 * Math.max(-1, Math.min(1, r));
  return (
    <figure>
      <figcaption className="text-note text-ink-2">
        Correlation with earlier years: bars on record, short lines as fitted; between the dotted lines chance
        alone
      </figcaption>
      <svg
        viewBox={`0 0 ${lags * 10} 100`}
        preserveAspectRatio="none"
        className="mt-1 block h-32 w-full"
        aria-hidden
      >
        <path d={`M0 50H${lags * 10}`} className="stroke-ink" vectorEffect="non-scaling-stroke" />
        {[sure, -sure].map((r) => (
          <path
            key={r}
            d={`M0 ${y(r)}H${lags * 10}`}
            strokeDasharray="3 4"
            className="stroke-ink-2"
            vectorEffect="non-scaling-stroke"
          />
        ))}
        {fit.autocorrelation.map((r, k) => (
          <rect
            key={k}
            x={k * 10 + 2}
            y={Math.min(50, y(r))}
            width={6}
            height={Math.abs(y(r) - 50)}
            className="fill-shore"
          />
        ))}
        {fit.autocorrelation.map((_, k) => (
          <path
            key={k}
            d={`M${k * 10 + 1} ${y(memory ** (k + 1))}h8`}
            strokeWidth={3}
            className="stroke-ink"
            vectorEffect="non-scaling-stroke"
          />
        ))}
      </svg>
      <div className="flex justify-between text-note text-ink-2">
        <span>a year before</span>
        <span>{lags} years before</span>
      </div>
      <ReadAsTable
        caption="Correlation with earlier years"
        heads={['Years before', 'on record', 'as fitted', 'left over']}
        rows={fit.autocorrelation.map((r, k) => [
          String(k + 1),
          ...[r, memory ** (k + 1), fit.leftOver[k]].map(signed),
        ])}
      />
    </figure>
  );
}

/** The record over the band in which nine of ten drawn futures run: most of it should lie inside. */
function RecordInBand(props: { years: readonly YearIndex[]; band: readonly (readonly number[])[] }) {
  const { years, band } = props;
  const low = Math.min(...band.map(([q]) => q), ...years.map(({ index }) => index));
  const high = Math.max(...band.map((q) => q[4]), ...years.map(({ index }) => index));
  const y = (index: number) => 100 * (1 - (index - low) / (high - low || 1));
  const line = (values: readonly number[]) => values.map((v, i) => `${i} ${y(v)}`).join('L');
  const inside = years.filter(({ index }, i) => band[i] && index >= band[i][0] && index <= band[i][4]).length;
  return (
    <figure className="mt-3">
      <figcaption className="text-note text-ink-2">
        The record as a line on the band of nine in ten drawn futures: {inside} of {years.length} years lie
        inside (90 of 100 are expected)
      </figcaption>
      <svg
        viewBox={`0 0 ${band.length - 1} 100`}
        preserveAspectRatio="none"
        className="mt-1 block h-28 w-full border-y border-rule-2"
        aria-hidden
      >
        <path
          d={`M${line(band.map((q) => q[4]))}L${band
            .map((q, i) => `${i} ${y(q[0])}`)
            .toReversed()
            .join('L')}Z`}
          className="fill-water"
          fillOpacity={0.35}
        />
        <path
          d={`M${line(years.slice(0, band.length).map(({ index }) => index))}`}
          fill="none"
          strokeWidth={1.5}
          vectorEffect="non-scaling-stroke"
          className="stroke-ink"
        />
      </svg>
      <div className="flex justify-between text-note text-ink-2 tabular-nums">
        <span>{years[0].year}</span>
        <span>{years[years.length - 1].year}</span>
      </div>
      <ReadAsTable
        caption="The record beside nine of ten drawn futures"
        heads={['Year', 'on record', 'from', 'to']}
        rows={years
          .slice(0, band.length)
          .map(({ year, index }, i) => [String(year), ...[index, band[i][0], band[i][4]].map(signed)])}
      />
    </figure>
  );
}
