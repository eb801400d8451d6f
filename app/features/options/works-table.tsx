import { useMemo, useState } from 'react';
import { moundCaution } from '#contract/grid-cautions.ts';
import { workTitles } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { Mound } from '#sim-core/spec/run-spec.ts';
import { FenceSymbol, FlagSymbol, LossSymbol, PlantingSymbol } from '#app/components/symbols.tsx';
import { Table, type Column } from '#app/components/table.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { EditedBlank } from './edited-blank.tsx';
import { fieldText, type WorkField } from './work-fields.ts';
import { placeInWords, placeOf, workInWords } from '#contract/works-words.ts';

interface NumberedWork {
  readonly number: number;
  readonly work: Work;
}

const atOnce = 200;

/** The works read as a table: the words for the picture, with the same selection, and a way to draw with keys alone. */
export function WorksTable(props: {
  works: readonly Work[];
  /** the cells that they come to lie on */
  grid: Grid;
  selected: ReadonlySet<string>;
  /** those that stand on marsh already */
  standing: ReadonlySet<string>;
  onSelect: (ids: readonly string[]) => void;
  /** absent for those who only read; returns what is wrong, or undefined when the value was taken */
  onEdit?: (id: string, field: WorkField, text: string) => string | undefined;
  onRemove?: (id: string) => void;
}) {
  const [most, setMost] = useState(atOnce);
  const { grid, onEdit, onRemove, selected } = props;
  const titles = useMemo(() => workTitles(props.works), [props.works]);
  const rows = props.works.map((work, i): NumberedWork => ({ number: i + 1, work }));
  const field = ({ work, number }: NumberedWork, name: WorkField, label: string) => {
    const text = fieldText(work, name);
    if (text === undefined) return '–';
    return onEdit ? (
      <EditedBlank
        key={`${work.id}/${name}/${text}`}
        label={`${label} of ${work.kind} ${number}`}
        value={text}
        onTake={(typed) => onEdit(work.id, name, typed)}
      />
    ) : (
      text
    );
  };
  const toggled = (id: string) =>
    selected.has(id) ? [...selected].filter((other) => other !== id) : [...selected, id];
  const columns: Column<NumberedWork>[] = [
    {
      key: 'selected',
      head: <span className="sr-only">selected</span>,
      cell: ({ work, number }) => (
        <input
          type="checkbox"
          aria-label={`Select number ${number}`}
          className="size-4 accent-ink touch:size-6"
          checked={selected.has(work.id)}
          onChange={() => props.onSelect(toggled(work.id))}
        />
      ),
    },
    { key: 'number', head: 'no.', number: true, cell: (row) => row.number },
    {
      key: 'what',
      head: 'works',
      cell: ({ work }) => (
        <>
          <WordButton className="text-left whitespace-normal" onClick={() => props.onSelect([work.id])}>
            <WorkSymbol work={work} />
            {titles.get(work.id)}: {workInWords(work)}
            {props.standing.has(work.id) && <span className="text-ink-2">; on marsh already</span>}
          </WordButton>
          {work.kind === 'mound' && <MoundNote mound={work} grid={grid} />}
        </>
      ),
    },
    { key: 'year', head: 'year', number: true, cell: (row) => field(row, 'year', 'Year') },
    ...(onEdit
      ? ([
          { key: 'x', head: 'easting, m', number: true, cell: (row) => field(row, 'x', 'Easting') },
          { key: 'y', head: 'northing, m', number: true, cell: (row) => field(row, 'y', 'Northing') },
          {
            key: 'radius',
            head: 'radius, m',
            number: true,
            wide: true,
            cell: (row) => field(row, 'radius', 'Radius'),
          },
        ] satisfies Column<NumberedWork>[])
      : ([
          {
            key: 'place',
            head: 'place',
            cell: ({ work }) => <span className="font-mono">{placeInWords(placeOf(work))}</span>,
          },
        ] satisfies Column<NumberedWork>[])),
    ...(onRemove
      ? ([
          {
            key: 'remove',
            head: <span className="sr-only">remove</span>,
            cell: ({ work, number }) => (
              <WordButton lined aria-label={`Remove number ${number}`} onClick={() => onRemove(work.id)}>
                Remove
              </WordButton>
            ),
          },
        ] satisfies Column<NumberedWork>[])
      : []),
  ];
  return (
    <>
      <Table
        caption="Works in this option"
        columns={columns}
        rows={rows.slice(0, most)}
        rowKey={({ work }) => work.id}
        selected={({ work }) => selected.has(work.id)}
      />
      {rows.length > most && (
        <WordButton lined className="mt-2" onClick={() => setMost(most + atOnce)}>
          Show {Math.min(atOnce, rows.length - most)} more of {rows.length}
        </WordButton>
      )}
    </>
  );
}

/** What the cells make of a mound where it stands, where they do not hold its shape. */
function MoundNote({ mound, grid }: { mound: Mound; grid: Grid }) {
  const caution = moundCaution(mound, grid);
  return caution === undefined ? null : <span className="block text-note text-ink-2">{caution}</span>;
}

/** The mark of one of the works, small enough for a line of text. */
export function WorkSymbol({ work }: { work: Pick<Work, 'kind'> }) {
  if (work.kind === 'mound') return <FlagSymbol />;
  if (work.kind === 'planting' || work.kind === 'clumps') return <PlantingSymbol />;
  return work.kind === 'fence' ? <FenceSymbol /> : <LossSymbol />;
}
