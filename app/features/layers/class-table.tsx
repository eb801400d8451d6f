import type { Layer } from '#contract/layers.ts';
import { Table } from '#app/components/table.tsx';
import { classNames } from '#app/lib/class-names.ts';
import { formatArea, formatCount } from '#app/lib/formats.ts';
import { rowErrors, type ClassField, type ClassRow } from './class-draft.ts';

interface ClassTableProps {
  layer: Pick<Layer, 'classCounts'>;
  rows: readonly ClassRow[];
  cellSize: number;
  onChange: (value: number, change: Partial<ClassRow>) => void;
}

const line =
  'h-7 touch:h-11 min-w-0 border-0 border-b-[1.5px] border-ink bg-transparent px-1 hover:bg-sheet ' +
  'aria-invalid:border-b-[3px] aria-invalid:border-danger aria-invalid:text-danger';

/** The class table of habitat: what each class of the raster is called, looks like and can hold. */
export function ClassTable({ layer, rows, cellSize, onChange }: ClassTableProps) {
  return (
    <div role="table" aria-label="Classes of habitat" className="text-[13px]">
      <div role="row" className={classNames(grid, 'pb-0.5 text-note font-semibold text-ink-2')}>
        <span role="columnheader">
          <span className="sr-only">Colour</span>
        </span>
        <span role="columnheader">class</span>
        <span role="columnheader" className="text-center">
          capacity
        </span>
        <span role="columnheader" className="text-center">
          vigour
        </span>
      </div>
      {rows.map((row) => (
        <ClassLine key={row.value} {...{ layer, row, cellSize, onChange }} />
      ))}
    </div>
  );
}

const grid =
  'grid grid-cols-[28px_minmax(0,1fr)_58px_58px] items-start gap-x-2 touch:grid-cols-[44px_minmax(0,1fr)_58px_58px]';

function ClassLine({ layer, row, cellSize, onChange }: Omit<ClassTableProps, 'rows'> & { row: ClassRow }) {
  const errors = rowErrors(row);
  const noteId = `class-${row.value}-note`;
  const cells = layer.classCounts?.find(({ value }) => value === row.value)?.cells ?? 0;
  const field = (name: ClassField, label: string, className: string) => (
    <input
      aria-label={`${label} of class ${row.value}`}
      aria-invalid={errors[name] !== undefined || undefined}
      aria-describedby={noteId}
      autoComplete="off"
      inputMode={name === 'name' ? undefined : 'decimal'}
      maxLength={name === 'name' ? 80 : 12}
      className={classNames(line, className)}
      value={row[name]}
      onChange={(event) => onChange(row.value, { [name]: event.target.value })}
    />
  );
  const messages = Object.values(errors);
  return (
    <div role="row" className={classNames(grid, 'border-t border-rule-2 py-1')}>
      <span role="cell">
        <input
          type="color"
          aria-label={`Colour of class ${row.value}`}
          value={row.colour}
          onChange={(event) => onChange(row.value, { colour: event.target.value })}
          className="block size-7 touch:size-11 cursor-pointer appearance-none border border-ink bg-transparent p-0 [&::-moz-color-swatch]:border-0 [&::-webkit-color-swatch]:border-0 [&::-webkit-color-swatch-wrapper]:p-0"
        />
      </span>
      <span role="cell" className="min-w-0">
        {field('name', 'Name', 'w-full font-semibold')}
        <span className="block px-1 text-note text-ink-2" title={`${formatCount(cells)} cells`}>
          class {row.value}, {formatArea(cells * cellSize * cellSize)}
        </span>
      </span>
      <span role="cell">{field('capacity', 'Capacity', 'w-full text-center font-mono font-medium')}</span>
      <span role="cell">{field('vigour', 'Vigour', 'w-full text-center font-mono font-medium')}</span>
      <span id={noteId} className="col-span-3 col-start-2 px-1 text-note text-danger empty:hidden">
        {messages.join('. ')}
      </span>
    </div>
  );
}

/** The same table for those who may not change it. */
export function ClassList({ layer, rows, cellSize }: Omit<ClassTableProps, 'onChange'>) {
  const area = (value: number) =>
    (layer.classCounts?.find((count) => count.value === value)?.cells ?? 0) * cellSize * cellSize;
  return (
    <Table
      caption="Classes of habitat"
      rows={rows}
      rowKey={(row) => String(row.value)}
      columns={[
        {
          key: 'name',
          head: 'class',
          cell: (row) => (
            <span className="flex items-baseline gap-1.5">
              <span
                aria-hidden="true"
                className="h-2.5 w-3.5 shrink-0 border border-ink"
                style={{ background: row.colour }}
              />
              <span>
                {row.name} <span className="text-ink-2">({row.value})</span>
              </span>
            </span>
          ),
        },
        {
          key: 'area',
          head: 'area',
          number: true,
          cell: (row) => <span className="whitespace-nowrap">{formatArea(area(row.value))}</span>,
        },
        { key: 'capacity', head: 'capacity', number: true, cell: (row) => row.capacity },
        { key: 'vigour', head: 'vigour', number: true, cell: (row) => row.vigour },
      ]}
    />
  );
}
