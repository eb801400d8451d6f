import { useRef, useState } from 'react';
import { Notice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { saveFile } from '#app/lib/save-file.ts';
import { classesToCsv, parseClassCsv, type RowProblem } from './class-csv.ts';
import type { HabitatClass } from '#contract/layers.ts';

const largest = 1_000_000;

/** The class table as a CSV file, out and in. What comes in fills the table, where it can still be changed. */
export function ClassFiles(props: {
  classes: readonly HabitatClass[] | undefined;
  fileName: string;
  /** undefined where the table may not be changed; tells which classes the raster does not hold */
  onImport: ((classes: readonly HabitatClass[]) => { taken: number; unknown: number[] }) | undefined;
}) {
  const { classes, onImport } = props;
  const input = useRef<HTMLInputElement>(null);
  const [problems, setProblems] = useState<readonly RowProblem[]>([]);
  const [said, setSaid] = useState('');
  const read = async (file: File) => {
    setSaid('');
    if (file.size > largest) {
      setProblems([
        {
          row: 0,
          message: 'Found a file of over 1 MB; a class table has a row a class. Is it the right file?',
        },
      ]);
      return;
    }
    const parsed = parseClassCsv(await file.text());
    setProblems(parsed.ok ? [] : parsed.problems);
    if (!parsed.ok || !onImport) return;
    const { taken, unknown } = onImport(parsed.classes);
    const left =
      unknown.length > 0 ? ` Left out, as the raster does not hold them: ${unknown.join(', ')}.` : '';
    setSaid(
      `${formatCounted(taken, 'class', 'classes')} filled in from ${file.name}; save them below.${left}`,
    );
  };
  return (
    <div className="mt-1">
      <div className="flex flex-wrap gap-x-4">
        <WordButton
          lined
          disabled={classes === undefined}
          onClick={() =>
            classes && saveFile(props.fileName, new Blob([classesToCsv(classes)], { type: 'text/csv' }))
          }
        >
          Classes as CSV
        </WordButton>
        {onImport && (
          <WordButton lined onClick={() => input.current?.click()}>
            Fill in from CSV
          </WordButton>
        )}
      </div>
      <input
        ref={input}
        type="file"
        hidden
        aria-label="Class table as CSV"
        accept=".csv,.txt,text/csv"
        onChange={(event) => {
          const file = event.target.files?.[0];
          event.target.value = '';
          if (file) void read(file);
        }}
      />
      <p role="status" className="text-note text-ink-2">
        {said}
      </p>
      {problems.length > 0 && (
        <Notice kind="problem" title="The class table cannot be read." className="mt-1">
          <ul className="mt-1">
            {problems.map(({ row, message }) => (
              <li key={`${row} ${message}`}>
                {row > 0 && <b>Row {row}: </b>}
                {message}
              </li>
            ))}
          </ul>
        </Notice>
      )}
    </div>
  );
}
