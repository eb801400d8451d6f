import { formatArea, formatNumber, formatShare } from '#app/lib/formats.ts';
import type { YearRecord } from './year-records.ts';
import type { Tolerances, YearlineNote } from './YearlinePlot.tsx';

export interface YearlineTableProps {
  readonly surveyYear: number;
  readonly lastYear: number;
  readonly droughtIndex: readonly number[];
  readonly tolerances?: Tolerances;
  readonly records?: readonly YearRecord[];
  readonly compare?: { readonly label: string; readonly records: readonly YearRecord[] };
  /** works and marks */
  readonly notes?: readonly YearlineNote[];
  readonly caption?: string;
}

/** The yearline read as a table: the same years, with nothing left to colour or height. */
export function YearlineTable(props: YearlineTableProps) {
  const { surveyYear, lastYear, droughtIndex, tolerances, records = [], compare, notes = [] } = props;
  const own = new Map(records.map((r) => [r.year, r]));
  const other = new Map(compare?.records.map((r) => [r.year, r]));
  const years = Array.from({ length: lastYear - surveyYear + 1 }, (_, i) => surveyYear + i);
  const head = 'pb-1 pl-3 text-right font-semibold text-ink-2 first:pl-0 first:text-left';
  const cell = 'border-t border-rule-2 py-1 pl-3 text-right align-baseline';
  return (
    <table className="w-full border-collapse text-note">
      <caption className="pb-1 text-left text-ink-2">{props.caption ?? 'The yearline as a table'}</caption>
      <thead>
        <tr>
          <th scope="col" className={head}>
            year
          </th>
          <th scope="col" className={head}>
            drought index
          </th>
          <th scope="col" className={head}>
            cover
          </th>
          {compare && (
            <th scope="col" className={head}>
              cover, {compare.label}
            </th>
          )}
          <th scope="col" className={head}>
            closing that year
          </th>
          <th scope="col" className={head}>
            ever closed by then
          </th>
          <th scope="col" className={`${head} text-left`}>
            works and marks
          </th>
        </tr>
      </thead>
      <tbody>
        {years.map((year) => {
          const index = year > surveyYear ? droughtIndex[year - surveyYear - 1] : undefined;
          const record = own.get(year);
          const compared = other.get(year);
          const dry = index !== undefined && tolerances !== undefined && index < tolerances.open;
          const words = notes.filter((n) => n.year === year).map((n) => n.label);
          if (dry) words.unshift('drought past tolerance');
          return (
            <tr key={year}>
              <th scope="row" className="border-t border-rule-2 py-1 text-left font-semibold">
                {year}
              </th>
              <td className={cell}>{index === undefined ? '–' : formatNumber(index, 2)}</td>
              <td className={cell}>{record ? formatShare(record.coverShare) : '–'}</td>
              {compare && <td className={cell}>{compared ? formatShare(compared.coverShare) : '–'}</td>}
              <td className={cell}>{record && year > surveyYear ? formatArea(record.closingArea) : '–'}</td>
              <td className={cell}>{record ? formatArea(record.closedArea) : '–'}</td>
              <td className={`${cell} text-left`}>{words.join(', ')}</td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
