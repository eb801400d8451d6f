import { useMemo, useState } from 'react';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { ReadAsTable } from '#app/components/read-as-table.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import type { DroughtRecord, IndexKind } from '#sim-core/spec/drought-record.ts';
import { yearlyRecord } from '#sim-core/weather/yearly-record.ts';
import { listYears } from './outlook-words.ts';
import { palmerRange, readSeries, standardisedRange } from './read-series.ts';
import { RecordPlot } from './record-plot.tsx';
import { factorNote, kindNamed, kindWords, monthNames, usualFactor } from './record-words.ts';
import { LineProblems, SeriesIntake } from './series-intake.tsx';
import { likelyColumns, seriesTable, type SeriesColumns } from './series-table.ts';

const none = -1;

/** Takes a drought record as text or file, shows what it would be, and stores it once nothing is wrong. */
export function RecordDialog(props: {
  /** index at or below which a year counts as a drought in the preview */
  threshold: number;
  busy: boolean;
  error: unknown;
  onOpenChange: (open: boolean) => void;
  onUse: (record: DroughtRecord, fileName: string) => void;
}) {
  const [text, setText] = useState('');
  const [fileName, setFileName] = useState<string>();
  const [name, setName] = useState<string>();
  const [source, setSource] = useState('');
  const [chosenKind, setKind] = useState<IndexKind>();
  const [typedFactor, setFactor] = useState<string>();
  const [season, setSeason] = useState({ from: 1, to: 12 });
  const [chosen, setChosen] = useState<Partial<SeriesColumns>>({});
  const table = useMemo(() => (text.trim() === '' ? undefined : seriesTable(text)), [text]);
  const columns = table && { ...likelyColumns(table), ...chosen };
  const head = table && columns ? table.columns[columns.value] : '';
  const kind = chosenKind ?? kindNamed(head);
  const presetByName = chosenKind === undefined && kind === 'standardised';
  const read =
    table && columns && readSeries(table, columns, kind === 'palmer' ? palmerRange : standardisedRange);
  const factorText = typedFactor ?? String(usualFactor[kind]);
  const factor = parseNumber(factorText);
  const factorFits = factor !== undefined && factor > 0 && factor <= 10;
  const undated = read?.ok === true && !read.dated;
  const values =
    read?.ok && read.dated
      ? read.entries.map(({ year, month, value }) => ({
          year: year!,
          ...(month !== undefined && { month }),
          value,
        }))
      : undefined;
  const monthly = read?.ok === true && read.monthly;
  const yearly = values && factorFits ? yearlyRecord({ values, factor, season }) : undefined;
  const shownName = name ?? fileName?.replace(/\.\w+$/, '').slice(0, 100) ?? 'Drought record';
  const ready = yearly !== undefined && yearly.years.length > 0 && shownName.trim() !== '';

  const take = (next: string, from?: string) => {
    setText(next);
    if (from === undefined) return;
    setFileName(from);
    setChosen({});
  };
  const pick = (part: keyof SeriesColumns, label: string, optional: boolean) =>
    table &&
    columns && (
      <BlankSelect
        label={label}
        value={columns[part] ?? none}
        onChange={(event) => {
          const column = Number(event.target.value);
          setChosen({ ...chosen, [part]: column === none ? undefined : column });
        }}
      >
        {optional && <option value={none}>none</option>}
        {table.columns.map((head, i) => (
          <option key={`${i} ${head}`} value={i}>
            {head}
          </option>
        ))}
      </BlankSelect>
    );

  return (
    <Dialog
      open
      onOpenChange={props.onOpenChange}
      wide
      title="Take a drought record"
      description="What the weather was: a year or a month a line with its index, negative is dry. Fits and cautions rest on it; nothing of the outlook changes yet."
    >
      <SeriesIntake text={text} placeholder={'year,pdsi\n1996,-0.4\n1997,1.2'} onText={take} />
      {table && table.columns.length > 1 && (
        <p className="mt-2 text-[13.5px] leading-[2.2]">
          Years or dates are in {pick('date', 'Column of years or dates', false)}, months in{' '}
          {pick('month', 'Column of months', true)}, the index in{' '}
          {pick('value', 'Column of the index', false)}.
        </p>
      )}
      <div className="mt-1">
        <WordChoice
          label="It is"
          showLabel
          options={[
            { key: 'palmer', label: `a ${kindWords.palmer}` },
            { key: 'standardised', label: kindWords.standardised },
          ]}
          value={kind}
          onChange={setKind}
        />
      </div>
      <p className="text-[13.5px] leading-[2.2]">
        Each unit stands for{' '}
        <Blank
          label="Palmer units that a unit of the record stands for"
          inputMode="decimal"
          characters={5}
          value={factorText}
          error={factorFits ? undefined : 'A number above 0 and up to 10 is expected'}
          onChange={(event) => setFactor(event.target.value)}
        />{' '}
        on the Palmer scale
        {monthly && (
          <>
            ; a year is the mean of{' '}
            {(['from', 'to'] as const).map((end) => (
              <span key={end}>
                {end === 'to' && ' to '}
                <BlankSelect
                  label={end === 'from' ? 'First month of the season' : 'Last month of the season'}
                  value={season[end]}
                  onChange={(event) => setSeason({ ...season, [end]: Number(event.target.value) })}
                >
                  {monthNames.map((words, i) => (
                    <option key={words} value={i + 1}>
                      {words}
                    </option>
                  ))}
                </BlankSelect>
              </span>
            ))}
          </>
        )}
        .
      </p>
      {!factorFits && (
        <p role="alert" className="text-note text-danger">
          Found “{factorText}” as the factor; a number above 0 and up to 10 is expected.
        </p>
      )}
      {presetByName && (
        <p className="text-note text-ink-2">Taken for an SPEI or SPI, as its column is called “{head}”.</p>
      )}
      {kind === 'standardised' && <p className="text-note text-ink-2">{factorNote}</p>}
      <div className="mt-3 min-h-12" aria-live="polite">
        {read?.ok === false && (
          <LineProblems title="This cannot be read yet; nothing is taken." problems={read.problems} />
        )}
        {undated && (
          <Notice kind="problem" title="No line names a year.">
            Found values alone; a record needs a year or a date in each line, such as 1996,-0.4.
          </Notice>
        )}
        {yearly && yearly.years.length === 0 && (
          <Notice kind="problem" title="No year is whole.">
            No year has a value for every month of the season; choose other months.
          </Notice>
        )}
        {yearly && yearly.years.length > 0 && read?.ok && (
          <>
            <RecordPlot
              years={yearly.years}
              threshold={props.threshold}
              label={`By year on the Palmer scale; ink at or below ${formatNumber(props.threshold)}, where open marsh dies`}
            />
            <p className="mt-1 text-[13.5px]">
              <b>{formatCounted(yearly.years.length, 'year')}</b>, {yearly.years[0].year} to{' '}
              {yearly.years[yearly.years.length - 1].year}
              {yearly.gaps.length > 0 && `; without a value: ${listYears(yearly.gaps)}`}
              {read.missing.length > 0 && `; ${formatCounted(read.missing.length, 'line')} without a value`}
              {yearly.cut.length > 0 && `; cut to the scale, −15 to 15: ${listYears(yearly.cut)}`}.
            </p>
            <ReadAsTable
              caption="The record by year, Palmer scale"
              heads={['Year', 'Index']}
              rows={yearly.years.map(({ year, index }) => [String(year), formatNumber(index)])}
            />
          </>
        )}
      </div>
      <div className="mt-2 grid gap-4 md:grid-cols-2">
        <TextField
          label="Name"
          maxLength={100}
          value={shownName}
          onChange={(event) => setName(event.target.value)}
        />
        <TextField
          label="Where it comes from"
          maxLength={1000}
          value={source}
          placeholder="Station, service, date of download"
          onChange={(event) => setSource(event.target.value)}
        />
      </div>
      {props.error ? <ProblemNotice error={props.error} title="Not stored." className="mt-3" /> : null}
      <DialogActions>
        <Button
          kind="primary"
          disabled={!ready}
          busy={props.busy}
          busyLabel="Storing"
          onClick={() => {
            if (ready && values && factorFits)
              props.onUse(
                { name: shownName.trim(), source: source.trim(), kind, factor, season, values },
                (fileName ?? 'pasted').slice(0, 200),
              );
          }}
        >
          Use this record
        </Button>
        <Button onClick={() => props.onOpenChange(false)}>Leave it</Button>
      </DialogActions>
    </Dialog>
  );
}
