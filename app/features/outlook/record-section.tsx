import type { SiteRecord } from '#contract/drought-records.ts';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted, formatDate } from '#app/lib/formats.ts';
import { mappingWords } from './record-words.ts';
import { RecordPlot } from './record-plot.tsx';

/** The drought record in use, how it is read, and what can be made of it. */
export function RecordSection(props: {
  record: SiteRecord | null;
  editable: boolean;
  threshold: number;
  onTake: () => void;
  onFit: () => void;
  /** undefined where gaps forbid it */
  onReadOn: (() => void) | undefined;
  onHistory: () => void;
}) {
  const { record, editable } = props;
  return (
    <section aria-labelledby="drought-record" className="mb-4 border-t border-rule pt-3 text-[13.5px]">
      <h2 id="drought-record" className="text-lead">
        The record
      </h2>
      {record ? (
        <>
          <RecordPlot
            years={record.years}
            threshold={props.threshold}
            label={`${record.name}: ${formatCounted(record.years.length, 'year')}, by year on the Palmer scale`}
          />
          <p className="mt-1 text-note text-ink-2">
            Read as {mappingWords(record, record.season.from !== 1 || record.season.to !== 12)}
            {record.gaps.length > 0 && `; ${formatCounted(record.gaps.length, 'year')} without a value`}.
            {record.source !== '' && ` ${record.source}.`} {record.fileName}, taken by {record.uploadedBy},{' '}
            {formatDate(record.uploadedAt)}.
          </p>
          <div className="mt-1 flex flex-wrap gap-x-4">
            <WordButton lined onClick={props.onFit}>
              {editable ? 'Fit the weather to it' : 'See the fits'}
            </WordButton>
            {editable && props.onReadOn && (
              <WordButton lined onClick={props.onReadOn}>
                Read it on from a drawn year
              </WordButton>
            )}
            {editable && (
              <WordButton lined onClick={props.onTake}>
                Take another
              </WordButton>
            )}
            <WordButton lined onClick={props.onHistory}>
              All records
            </WordButton>
          </div>
        </>
      ) : (
        <>
          <p className="mt-1">
            There is no drought record yet: how often droughts come rests on judgement alone.
          </p>
          {editable && (
            <WordButton lined onClick={props.onTake}>
              Take a drought record
            </WordButton>
          )}
        </>
      )}
    </section>
  );
}
