import { Table } from '#app/components/table.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { of100 } from '#sim-core/compare/chance-words.ts';
import type { OutlookFigures, Pair } from '#sim-core/compare/comparison-figures.ts';
import { toldApart } from '#sim-core/compare/told-apart.ts';
import { Chosen, OptionName } from './chosen.tsx';

const [width, height] = [120, 16];

/** Differences of pairs that share their luck, with their intervals, and how much sharper that makes them. */
export function PairTable(props: { figures: OutlookFigures; chosen: number | undefined }) {
  const { pairs, options, replicates } = props.figures;
  const least = Math.min(0, ...pairs.map(({ sooner }) => sooner.low));
  const most = Math.max(1, ...pairs.map(({ sooner }) => sooner.high));
  const x = (years: number) => 4 + ((width - 8) * (years - least)) / (most - least);
  const sharper = pairs
    .map(({ sooner }) => sooner.sharperBy)
    .filter((times) => Number.isFinite(times))
    .sort((a, b) => a - b);
  const typical = sharper[Math.floor(sharper.length / 2)];
  const drawing = (pair: Pair) => (
    <svg width={width} height={height} aria-hidden="true" className="block">
      <path d={`M${x(0)} 0V${height}`} className="stroke-rule" />
      <path d={`M${x(pair.sooner.low)} 8H${x(pair.sooner.high)}`} className="stroke-ink" strokeWidth={3} />
      <circle
        cx={x(pair.sooner.estimate)}
        cy={8}
        r={4.5}
        className={toldApart(pair) ? 'fill-ink' : 'fill-ground stroke-ink'}
        strokeWidth={1.5}
      />
    </svg>
  );
  return (
    <section aria-label="Paired differences">
      <div className="flex flex-wrap justify-between gap-x-4 pb-1">
        <b>Paired differences</b>
        <span className="text-note text-ink-2">same luck, {replicates} pairs</span>
      </div>
      <Table
        caption="Years that the first option recovers sooner than the second, with a 95 % interval, and how many more of 100 futures it closes in time"
        rows={pairs}
        rowKey={({ first, second }) => `${first} ${second}`}
        columns={[
          {
            key: 'pair',
            head: 'recovers sooner by',
            cell: ({ first, second }) => (
              <>
                <OptionName name={options[first].name} chosen={first === props.chosen} /> than{' '}
                {options[second].name}
                {second === props.chosen && <Chosen />}
              </>
            ),
          },
          { key: 'drawn', head: <span className="sr-only">drawn</span>, wide: true, cell: drawing },
          {
            key: 'years',
            head: 'years',
            number: true,
            cell: ({ sooner }) => (
              <>
                <b>{formatNumber(sooner.estimate, 1)}</b>{' '}
                <span className="text-note whitespace-nowrap text-ink-2">
                  {formatNumber(sooner.low, 1)} to {formatNumber(sooner.high, 1)}
                </span>
              </>
            ),
          },
          {
            key: 'chance',
            head: 'in time',
            number: true,
            cell: ({ chanceGained }) => signed(of100(chanceGained.estimate)),
          },
        ]}
      />
      {typical !== undefined && (
        <p className="mt-1.5 text-note text-ink-2">
          Years are cut at the horizon, so futures still open there count as recovering then, never as lost.
          {typical >= 1.05 &&
            ` All options meet the same weather and luck, future by future. With luck of its own for each option, the same intervals would take ${moreFutures(typical)}.`}
        </p>
      )}
    </section>
  );
}

/** `40 % more futures`, and from twice as many on `2.4 times the futures`. */
const moreFutures = (ratio: number) =>
  ratio < 2
    ? `${formatNumber(100 * (ratio - 1), 0)} % more futures`
    : `${formatNumber(ratio, ratio < 10 ? 1 : 0)} times the futures`;

const signed = (n: number) => (n === 0 ? '0' : `${n > 0 ? '+' : '−'}${Math.abs(n)}`);
