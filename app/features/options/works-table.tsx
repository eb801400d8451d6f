import { useState } from 'react';
import { Blank } from '#app/components/blank.tsx';
import { FlagSymbol, PlantingSymbol } from '#app/components/symbols.tsx';
import { Table, type Column } from '#app/components/table.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { DraftWork } from './option-draft.ts';
import { moundInWords, placeInWords, placeOf, workInWords } from './works-words.ts';

export interface NumberedWork {
  readonly number: number;
  readonly work: DraftWork;
}
/** Fields of a mound that the table edits, as they are typed. */
export type MoundField = 'year' | 'x' | 'y' | 'radius';

const atOnce = 200;

/** The works read as a table: the way to draw with keys alone, and on a phone. */
export function WorksTable(props: {
  works: readonly DraftWork[];
  selected: string | undefined;
  onSelect: (key: string) => void;
  /** absent for those who only read; returns what is wrong, or undefined when the value was taken */
  onEdit?: (key: string, field: MoundField, text: string) => string | undefined;
  onRemove?: (key: string) => void;
}) {
  const [most, setMost] = useState(atOnce);
  const { onEdit, onRemove } = props;
  const rows = props.works.map((work, i): NumberedWork => ({ number: i + 1, work }));
  const field = (row: NumberedWork, name: MoundField, label: string) => {
    const { action, key } = row.work;
    if (action.kind !== 'mound') return name === 'year' ? action.year : '–';
    return onEdit ? (
      <EditedNumber
        key={`${key}/${name}/${action[name]}`}
        label={`${label} of mound ${row.number}`}
        value={action[name]}
        onTake={(text) => onEdit(key, name, text)}
      />
    ) : (
      action[name]
    );
  };
  const columns: Column<NumberedWork>[] = [
    { key: 'number', head: 'no.', number: true, cell: (row) => row.number },
    {
      key: 'what',
      head: 'works',
      cell: ({ work: { key, action } }) => (
        <WordButton className="text-left whitespace-normal" onClick={() => props.onSelect(key)}>
          {action.kind === 'mound' ? <FlagSymbol /> : <PlantingSymbol />}
          {action.kind === 'mound' ? `mound, ${moundInWords(action)}` : workInWords(action)}
        </WordButton>
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
            cell: ({ work }) => <span className="font-mono">{placeInWords(placeOf(work.action))}</span>,
          },
        ] satisfies Column<NumberedWork>[])),
    ...(onRemove
      ? ([
          {
            key: 'remove',
            head: <span className="sr-only">remove</span>,
            cell: ({ work, number }) => (
              <WordButton lined aria-label={`Remove number ${number}`} onClick={() => onRemove(work.key)}>
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
        rowKey={({ work }) => work.key}
        selected={({ work }) => work.key === props.selected}
      />
      {rows.length > most && (
        <WordButton lined className="mt-2" onClick={() => setMost(most + atOnce)}>
          Show {Math.min(atOnce, rows.length - most)} more of {rows.length}
        </WordButton>
      )}
    </>
  );
}

/** A number that is taken when it is left or confirmed, and put back by Escape. */
function EditedNumber(props: { label: string; value: number; onTake: (text: string) => string | undefined }) {
  const [text, setText] = useState(String(props.value));
  const [error, setError] = useState<string>();
  const take = () => {
    if (text !== String(props.value)) setError(props.onTake(text));
  };
  return (
    <>
      <Blank
        label={props.label}
        inputMode="decimal"
        value={text}
        error={error}
        onChange={(event) => setText(event.target.value)}
        onBlur={take}
        onKeyDown={(event) => {
          if (event.key === 'Enter') take();
          if (event.key === 'Escape') {
            setText(String(props.value));
            setError(undefined);
          }
        }}
      />
      {error !== undefined && (
        <span role="alert" className="block max-w-[32ch] text-left text-note text-danger">
          {error}
        </span>
      )}
    </>
  );
}
