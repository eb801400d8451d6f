import { useMemo, useState } from 'react';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { layOver, type LaidSeries, type Laying, type OutlookDraft } from './outlook-draft.ts';
import { readSeries, type SeriesEntry } from './read-series.ts';
import { LineProblems, SeriesIntake } from './series-intake.tsx';
import { likelyColumns, seriesTable } from './series-table.ts';

/** Takes a drought series as text or file, says what it found, and lays it over the years to come. */
export function SeriesDialog(props: {
  draft: OutlookDraft;
  onLay: (values: ReadonlyMap<number, number>) => void;
  onOpenChange: (open: boolean) => void;
}) {
  const { draft, onLay, onOpenChange } = props;
  const [text, setText] = useState('');
  const [chosen, setChosen] = useState<Laying>();
  const parsed = useMemo(() => (text.trim() === '' ? undefined : parseSeries(text)), [text]);
  const entries = parsed?.ok ? parsed.entries : undefined;
  const dated = parsed?.ok === true && parsed.dated;
  const usual: Laying =
    dated && entries && layOver(draft, entries, 'by-year').set > 0 ? 'by-year' : 'in-order';
  const how = dated ? (chosen ?? usual) : 'in-order';
  const laid = entries && layOver(draft, entries, how);

  return (
    <Dialog
      open
      onOpenChange={onOpenChange}
      wide
      title="Lay a drought series over the years"
      description="Palmer scale, negative is dry. One line a year: year and value, or the value alone; comma, semicolon or tab, decimal point or comma."
    >
      <SeriesIntake text={text} placeholder={'2027,-0.4\n2028,1.2'} onText={setText} />
      <div className="mt-3 min-h-16" aria-live="polite">
        {parsed?.ok === false && <LineProblems title="This cannot be read yet." problems={parsed.problems} />}
        {entries && laid && (
          <>
            <p className="text-[13.5px]">
              <b>{formatCounted(entries.length, 'value')}</b>
              {dated && `, ${spanOf(entries)}`}. {layingWords(laid, draft)}
            </p>
            {dated && (
              <WordChoice
                label="Lay them"
                showLabel
                options={[
                  { key: 'by-year', label: 'by their years' },
                  { key: 'in-order', label: `in order, from ${draft.span.surveyYear + 1} on` },
                ]}
                value={how}
                onChange={setChosen}
              />
            )}
          </>
        )}
      </div>
      <DialogActions>
        <Button
          kind="primary"
          disabled={!laid || laid.set === 0}
          onClick={() => {
            if (!laid) return;
            onLay(laid.values);
            onOpenChange(false);
          }}
        >
          {laid && laid.set > 0 ? `Set ${formatCounted(laid.set, 'year')}` : 'Set the years'}
        </Button>
        <Button onClick={() => onOpenChange(false)}>Leave it</Button>
      </DialogActions>
    </Dialog>
  );
}

function spanOf(entries: readonly SeriesEntry[]): string {
  const years = entries.map((entry) => entry.year ?? 0);
  return `${Math.min(...years)} to ${Math.max(...years)}`;
}

function layingWords({ set, kept, unused }: LaidSeries, draft: OutlookDraft): string {
  const { surveyYear, years } = draft.span;
  if (set === 0)
    return `None of them falls in the simulated years ${surveyYear + 1} to ${surveyYear + years}.`;
  const words = [`${formatCounted(set, 'simulated year')} ${set === 1 ? 'gets' : 'get'} a value`];
  if (kept > 0)
    words.push(`${kept} ${kept === 1 ? 'keeps' : 'keep'} what ${kept === 1 ? 'it has' : 'they have'}`);
  if (unused > 0) words.push(`${formatCounted(unused, 'value')} ${unused === 1 ? 'is' : 'are'} not used`);
  return `${words.join('; ')}.`;
}

function parseSeries(text: string) {
  const table = seriesTable(text);
  return readSeries(table, likelyColumns(table));
}
