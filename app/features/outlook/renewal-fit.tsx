import { useState } from 'react';
import { Blank } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { Table } from '#app/components/table.tsx';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import type { DroughtRenewal } from '#sim-core/spec/weather-source.ts';
import { fewestBeginnings, renewalOf, type RenewalFit } from '#sim-core/weather/fit-renewal.ts';
import type { WaitingFit } from '#sim-core/weather/fit-waiting-law.ts';
import { chanceOfLonger, meanWait } from '#sim-core/weather/waiting-law.ts';
import type { YearIndex } from '#sim-core/weather/yearly-record.ts';
import { useWeatherWork } from './use-weather-work.ts';

const lawNames = { exponential: 'exponential', weibull: 'Weibull', gamma: 'gamma', fixed: 'fixed' } as const;

/** Droughts that come back, fitted to the record: what counts as one, which law of return, and how well it fits. */
export function RenewalFitView(props: {
  years: readonly YearIndex[];
  /** index at or below which a year counts as a drought to begin with */
  threshold: number;
  surveyYear: number;
  onUse: ((weather: DroughtRenewal) => void) | undefined;
}) {
  const { years, surveyYear } = props;
  const [typed, setTyped] = useState(String(props.threshold));
  const [chosen, setChosen] = useState<WaitingFit['wait']['law']>();
  const threshold = parseNumber(typed);
  const fits = threshold !== undefined && Math.abs(threshold) <= 15;
  const asked: [readonly YearIndex[], number] | undefined = fits ? [years, threshold] : undefined;
  const done = useWeatherWork('fitRenewal', asked);
  const current = done && asked && done.question === JSON.stringify(asked);
  const fit = done?.answer;
  return (
    <div className="mt-3 text-[13.5px]">
      <p className="leading-[2.2]">
        A year at or below{' '}
        <Blank
          label="Index at or below which a year counts as a drought"
          inputMode="decimal"
          characters={5}
          value={typed}
          error={fits ? undefined : 'A number from −15 to 15 is expected'}
          onChange={(event) => {
            setTyped(event.target.value);
            setChosen(undefined);
          }}
        />{' '}
        counts as a drought, and years of it in a row as one.
      </p>
      {!fits && (
        <p role="alert" className="text-note text-danger">
          Found “{typed}” as the index of a drought; a number from −15 to 15 is expected.
        </p>
      )}
      {fits && !current && <LoadingLines label="Fitting the laws" />}
      {current && !fit && (
        <p>
          Not fitted: fewer than {fewestBeginnings} droughts begin within the record at this index. Choose a
          higher one, or say in the outlook how often they come.
        </p>
      )}
      {current && fit && (
        <Fitted
          fit={fit}
          chosen={fit.intervals.find(({ wait }) => wait.law === chosen) ?? fit.interval}
          onChoose={setChosen}
          surveyYear={surveyYear}
          onUse={props.onUse}
        />
      )}
    </div>
  );
}

function Fitted(props: {
  fit: RenewalFit;
  chosen: WaitingFit;
  onChoose: (law: WaitingFit['wait']['law']) => void;
  surveyYear: number;
  onUse: ((weather: DroughtRenewal) => void) | undefined;
}) {
  const { fit, chosen, surveyYear } = props;
  const { found, intervals, interval } = fit;
  const weather = renewalOf(fit, surveyYear, chosen.wait);
  const [low, high] = chosen.meanInterval;
  return (
    <>
      <p>
        <b>{formatCounted(found.droughts.length, 'drought')}</b> on record. One begins every{' '}
        <b>{formatNumber(chosen.mean, 1)} years</b> on average ({formatNumber(low, 1)} to{' '}
        {formatNumber(high, 1)}, 95 %), lasts {formatNumber(meanWait(fit.length), 1)} years (
        {lawNames[fit.length.law]}) at an index of {formatNumber(fit.depth)} ± {formatNumber(fit.depthSpread)}
        ; other years have {formatNumber(fit.between)}.
      </p>
      <div className="mt-3 grid gap-6 md:grid-cols-2">
        <div>
          <Table
            caption="Laws of the years from one drought to the next"
            showCaption
            rows={intervals}
            rowKey={({ wait }) => wait.law}
            selected={({ wait }) => wait.law === chosen.wait.law}
            columns={[
              {
                key: 'law',
                head: 'law',
                cell: ({ wait }) => (
                  <label className="inline-flex min-h-7 cursor-pointer items-center gap-2 touch:min-h-11">
                    <input
                      type="radio"
                      name="return-law"
                      className="accent-ink"
                      checked={wait.law === chosen.wait.law}
                      onChange={() => props.onChoose(wait.law)}
                    />
                    {lawNames[wait.law]}
                  </label>
                ),
              },
              { key: 'mean', head: 'mean', number: true, cell: ({ mean }) => formatNumber(mean, 1) },
              {
                key: 'shape',
                head: 'shape',
                number: true,
                cell: ({ wait }) => ('shape' in wait ? formatNumber(wait.shape) : '1'),
              },
              { key: 'aic', head: 'AIC', number: true, cell: ({ aic }) => formatNumber(aic, 1) },
            ]}
          />
          <p className="mt-1 text-note text-ink-2">
            {interval.wait.law === 'exponential'
              ? 'No law is clearly better than the exponential one, which says that droughts come without memory.'
              : `The ${lawNames[interval.wait.law]} law fits clearly better than droughts without memory: they come ${
                  'shape' in interval.wait && interval.wait.shape > 1 ? 'more evenly' : 'in bunches'
                }.`}{' '}
            By maximum likelihood; the years before the first drought and after the last count too. The lower
            the AIC the better; of laws within 2 of the best the exponential is taken.
          </p>
        </div>
        <Survival fit={fit} chosen={chosen} />
      </div>
      <ReadAsTable
        caption="Droughts on record"
        heads={['Years', 'length', 'mean index', 'driest']}
        rows={found.droughts.map(({ from, until, years, meanIndex, driestIndex, cutShort }) => [
          from === until ? String(from) : `${from} to ${until}`,
          `${years}${cutShort ? ' or more' : ''}`,
          formatNumber(meanIndex),
          formatNumber(driestIndex),
        ])}
      />
      {props.onUse && (
        <Button kind="primary" className="mt-3" onClick={() => props.onUse?.(weather)}>
          Use this fit
        </Button>
      )}
    </>
  );
}

/** Share of intervals that are longer than so many years: as steps on record (Kaplan–Meier), as a curve as fitted. */
function Survival({ fit, chosen }: { fit: RenewalFit; chosen: WaitingFit }) {
  const last = Math.max(chosen.mean * 2, ...fit.seen.map(({ time }) => time)) * 1.05;
  const x = (t: number) => (t / last) * 200;
  const y = (share: number) => 100 * (1 - share);
  const steps = fit.seen.map(({ time, open }) => `H${x(time)}V${y(open)}`).join('');
  const curve = Array.from({ length: 81 }, (_, i) => (i * last) / 80);
  return (
    <figure>
      <figcaption className="text-note text-ink-2">
        Share of intervals longer than so many years: steps on record, curve as fitted
      </figcaption>
      <svg
        viewBox="0 0 200 100"
        preserveAspectRatio="none"
        className="mt-1 block h-40 w-full border-y border-rule-2"
        aria-hidden
      >
        <path
          d={`M0 0${steps}H${x(fit.seen[fit.seen.length - 1]?.time ?? 0)}`}
          fill="none"
          strokeWidth={2.5}
          vectorEffect="non-scaling-stroke"
          className="stroke-shore"
        />
        <path
          d={`M${curve.map((t) => `${x(t)} ${y(chanceOfLonger(chosen.wait, t))}`).join('L')}`}
          fill="none"
          strokeWidth={2}
          vectorEffect="non-scaling-stroke"
          className="stroke-ink"
        />
      </svg>
      <div className="flex justify-between text-note text-ink-2 tabular-nums">
        <span>0 years</span>
        <span>{formatNumber(last, 0)}</span>
      </div>
      <ReadAsTable
        caption="Share of intervals that are longer, per cent"
        heads={['Years', 'on record', 'as fitted', 'at risk']}
        rows={fit.seen.map(({ time, open, atRisk }) => [
          String(time),
          formatNumber(100 * open, 0),
          formatNumber(100 * chanceOfLonger(chosen.wait, time), 0),
          String(atRisk),
        ])}
      />
    </figure>
  );
}
