import type { DroughtRecordProps } from './drought-chart.tsx';
import { useState } from 'react';
import { classNames } from '#app/lib/class-names.ts';
import { formatNumber } from '#app/lib/formats.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { palmerClass } from '#sim-core/weather/palmer-classes.ts';

/** The drought record as a table, in which single years are typed. */
export function YearTable(props: DroughtRecordProps) {
  const { series, tolerances, year, onYear, onChange } = props;
  return (
    <table className="w-full border-collapse text-[13px]">
      <caption className="sr-only">Drought index of each simulated year</caption>
      <thead>
        <tr className="text-left text-note text-ink-2">
          <th scope="col" className="pb-1 pl-2.5 font-semibold">
            year
          </th>
          <th scope="col" className="pb-1 text-center font-semibold">
            index
          </th>
          <th scope="col" className="pb-1 font-semibold">
            class
          </th>
        </tr>
      </thead>
      <tbody>
        {series.map(({ year: each, index, acting }) => (
          <tr
            key={each}
            className={classNames(
              'border-t border-rule-2',
              each === year && 'bg-sheet [&>th]:border-l-[5px] [&>th]:border-ink',
              acting < tolerances.open && 'font-bold',
            )}
          >
            <th scope="row" className="py-0.5 pl-2.5 text-left font-mono font-semibold">
              {onChange ? (
                each
              ) : (
                <button
                  type="button"
                  aria-label={`Read ${each} on the drawing`}
                  aria-pressed={each === year}
                  className="min-h-6 touch:min-h-11 hover:underline"
                  onClick={() => onYear(each)}
                >
                  {each}
                </button>
              )}
            </th>
            <td className="px-3 py-0.5 text-center font-mono">
              {onChange ? (
                <IndexBlank
                  year={each}
                  index={index}
                  onFocus={() => onYear(each)}
                  onChange={(value) => onChange(each, value)}
                />
              ) : (
                index
              )}
            </td>
            <td className="py-0.5 leading-tight">
              {palmerClass(acting)}
              {acting !== index && (
                <span className="block text-note font-normal text-ink-2">
                  {formatNumber(acting)} with the trend
                </span>
              )}
              {acting < tolerances.open && (
                <span className="block text-note font-normal text-ink-2">
                  {acting < tolerances.mound ? 'kills near a mound too' : 'kills open marsh'}
                </span>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** Holds what is typed until it is left; what is no number on the scale then gives way to the last that was. */
function IndexBlank(props: {
  year: number;
  index: number;
  onFocus: () => void;
  onChange: (index: number) => void;
}) {
  const [typed, setTyped] = useState<string>();
  const value = typed === undefined ? undefined : parseNumber(typed);
  const wrong = typed !== undefined && (value === undefined || Math.abs(value) > 15);
  return (
    <input
      aria-label={`Drought index of ${props.year}`}
      aria-invalid={wrong || undefined}
      title={wrong ? 'A number from −15 to 15 is expected' : undefined}
      inputMode="text"
      autoComplete="off"
      className="h-6 w-16 touch:h-11 border-0 border-b-[1.5px] border-ink bg-transparent text-center font-mono font-semibold hover:bg-sheet aria-invalid:border-b-[3px] aria-invalid:border-danger aria-invalid:text-danger"
      value={typed ?? String(props.index)}
      onFocus={props.onFocus}
      onChange={(event) => {
        setTyped(event.target.value);
        const next = parseNumber(event.target.value);
        if (next !== undefined && Math.abs(next) <= 15) props.onChange(next);
      }}
      onBlur={() => setTyped(undefined)}
    />
  );
}
