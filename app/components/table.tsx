import type { ReactNode } from 'react';
import { classNames } from '#app/lib/class-names.ts';

export interface Column<Row> {
  key: string;
  head: ReactNode;
  cell: (row: Row) => ReactNode;
  /** numbers stand to the right, so that their digits line up */
  number?: boolean;
  /** left out on a narrow screen */
  wide?: boolean;
}

/** Rows between hairlines. A table without rows is not drawn: say in words what is missing (EmptyState). */
export function Table<Row>(props: {
  /** what the table holds; read out, and shown when `showCaption` */
  caption: string;
  showCaption?: boolean;
  /** the column heads are only read out */
  headless?: boolean;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  /** the row that is selected carries a bar of ink */
  selected?: (row: Row) => boolean;
  className?: string;
}) {
  const selectable = props.selected !== undefined;
  return (
    <table className={classNames('w-full border-collapse text-[13px] leading-[1.3]', props.className)}>
      <caption
        className={props.showCaption ? 'pb-1 text-left text-note font-semibold text-ink-2' : 'sr-only'}
      >
        {props.caption}
      </caption>
      <thead className={props.headless ? 'sr-only' : undefined}>
        <tr>
          {props.columns.map((column) => (
            <th
              key={column.key}
              scope="col"
              className={cellClass(column, selectable, 'pb-1 text-note font-semibold text-ink-2')}
            >
              {column.head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {props.rows.map((row) => {
          const selected = props.selected?.(row) === true;
          return (
            <tr
              key={props.rowKey(row)}
              aria-selected={selectable ? selected : undefined}
              className={classNames(
                'border-t border-rule-2',
                selected &&
                  'bg-sheet font-bold [&>td:first-child]:border-l-[5px] [&>td:first-child]:border-ink',
              )}
            >
              {props.columns.map((column) => (
                <td key={column.key} className={cellClass(column, selectable, 'py-1.5 align-baseline')}>
                  {column.cell(row)}
                </td>
              ))}
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

function cellClass<Row>(column: Column<Row>, selectable: boolean, more: string): string {
  return classNames(
    'pr-3 pl-2.5 last:pr-0',
    // The first column stands flush with its heading, but for room for the bar where a row can be selected.
    !selectable && 'first:pl-0',
    column.number ? 'text-right' : 'text-left',
    column.wide && 'max-md:hidden',
    more,
  );
}
