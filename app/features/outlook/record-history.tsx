import type { StoredRecord } from '#contract/drought-records.ts';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted, formatDate } from '#app/lib/formats.ts';
import { saveFile } from '#app/lib/save-file.ts';
import { mappingWords } from './record-words.ts';

/** Every record of the site with its provenance; a replaced one can be taken again, any can be saved or forgotten. */
export function RecordHistory(props: {
  records: readonly StoredRecord[] | undefined;
  error: unknown;
  editable: boolean;
  busy: boolean;
  onTakeAgain: (record: StoredRecord) => void;
  onForget: (record: StoredRecord) => void;
  onClose: () => void;
}) {
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title="Drought records of this site"
      description="The one in use first. A fit that was taken into an outlook stays as it is, whatever becomes of its record."
    >
      {props.error ? <ProblemNotice error={props.error} className="mt-3" /> : null}
      {props.records === undefined && !props.error && <LoadingLines label="Fetching the records" />}
      <ul className="mt-3">
        {props.records?.map((record) => (
          <li key={record.id} className="border-t border-rule-2 py-2 text-[13.5px]">
            <b>{record.name}</b>{' '}
            {record.replacedAt === null ? '(in use)' : `(replaced ${formatDate(record.replacedAt)})`}
            <p className="text-note text-ink-2">
              {formatCounted(record.values.length, 'value')}, read as{' '}
              {mappingWords(
                record,
                record.values.some(({ month }) => month !== undefined),
              )}
              . {record.source !== '' && `${record.source}. `}
              {record.fileName}, taken by {record.uploadedBy}, {formatDate(record.uploadedAt)}.
            </p>
            <div className="flex flex-wrap gap-x-4">
              <WordButton lined onClick={() => saveFile(`${record.name}.csv`, asCsv(record))}>
                Save as CSV
              </WordButton>
              {props.editable && record.replacedAt !== null && (
                <WordButton lined busy={props.busy} onClick={() => props.onTakeAgain(record)}>
                  Use it again
                </WordButton>
              )}
              {props.editable && (
                <WordButton lined busy={props.busy} onClick={() => props.onForget(record)}>
                  Forget it
                </WordButton>
              )}
            </div>
          </li>
        ))}
      </ul>
      <DialogActions>
        <Button onClick={props.onClose}>Close</Button>
      </DialogActions>
    </Dialog>
  );
}

function asCsv({ values }: StoredRecord): Blob {
  const lines = values.map(({ year, month, value }) =>
    month === undefined ? `${year},${value}` : `${year}-${String(month).padStart(2, '0')},${value}`,
  );
  const head = values[0].month === undefined ? 'year,value' : 'date,value';
  return new Blob([[head, ...lines].join('\r\n') + '\r\n'], { type: 'text/csv' });
}
