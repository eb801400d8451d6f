import type { Run } from '#contract/runs.ts';
import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { CautionList } from '#app/components/caution-list.tsx';
import { Notice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { CellHistory } from '#app/features/runs/cell-history.tsx';
import { RunCheck } from '#app/features/runs/run-check.tsx';
import { RunExports } from '#app/features/runs/run-exports.tsx';
import { RunFacts, YearFacts } from '#app/features/runs/run-facts.tsx';
import { isAtWork, type LiveRun } from '#app/features/runs/run-manager.ts';
import { recoveryWords, statusWords } from '#app/features/runs/run-words.ts';
import type { YearRecord } from '#app/yearline/year-records.ts';
import type { AskedDeed } from './run-deed.tsx';
import { useSite } from './use-site.ts';

/** What a run came to, what decided it, whether it comes out the same again, and what can be taken away. */
export function RunMargin(props: {
  run: Run;
  live: LiveRun | undefined;
  year: number;
  lastYear: number;
  /** year whose frame is stored, for export */
  frameYear: number | undefined;
  records: readonly YearRecord[];
  rows: readonly SeriesRow[];
  compare: { label: string; records: readonly YearRecord[]; recovery: string | undefined } | undefined;
  cell: { column: number; row: number } | undefined;
  /** how many years have a frame */
  stored: number;
  onDeed: (deed: AskedDeed['deed']) => void;
}) {
  const { run, live, year, records, compare } = props;
  const { mayDraw } = useSite();
  const at = (list: readonly YearRecord[]) => list.find((record) => record.year === year);
  const compared = compare && at(compare.records);
  const recovery = recoveryWords(run, run.spec.target);
  const result = run.result ?? undefined;
  return (
    <>
      <h1 className="text-lead leading-tight font-bold">{run.name}</h1>
      <p className="pb-2 text-note text-ink-2">{statusWords(run, live)}</p>
      {recovery !== undefined && (
        <p className="pb-2 text-title font-bold">
          {`${recovery[0].toUpperCase()}${recovery.slice(1)}`}
          {compare?.recovery !== undefined && (
            <span className="block text-body font-normal">
              {compare.label}: {compare.recovery}, with the same luck
            </span>
          )}
          <span className="block text-note font-normal text-ink-2">
            recovered means {Math.round(run.spec.target * 100)} % of what the ground can carry
          </span>
        </p>
      )}
      <RunState run={run} live={live} />
      <RunCheck run={run} live={live} />
      {result?.warnings
        .filter((warning) => !run.cautions.some(({ message }) => message === warning))
        .map((warning) => (
          <Notice key={warning} title="Mind:" className="my-2">
            {warning}
          </Notice>
        ))}
      <div className="my-2">
        <CautionList cautions={run.cautions} found="found when it was started" />
      </div>
      <YearFacts
        year={year}
        record={at(records)}
        compare={compare && compared ? { label: compare.label, record: compared } : undefined}
        rows={props.rows}
        referenceArea={result?.referenceArea}
      />
      <CellHistory
        runId={run.id}
        grid={run.grid}
        cell={props.cell}
        surveyYear={run.surveyYear}
        lastYear={props.lastYear}
        year={year}
        stored={props.stored}
      />
      <RunFacts run={run} result={result} />
      <RunExports run={run} year={props.frameYear} />
      {mayDraw && (
        <div className="flex flex-wrap gap-x-4 border-t border-rule pt-1">
          <WordButton onClick={() => props.onDeed('rename')}>Rename</WordButton>
          <WordButton className="text-danger" onClick={() => props.onDeed('delete')}>
            Delete
          </WordButton>
        </div>
      )}
      <p className="mt-3 text-note text-ink-2">
        One simulated future supports a decision; it is no permit, survey or engineering design.
      </p>
    </>
  );
}

/** Where a run did not come to its end: why, and what is there all the same. */
function RunState({ run, live }: { run: Run; live: LiveRun | undefined }) {
  const kept = `${run.storedYears.length} of ${run.years + 1} years are stored and can be seen.`;
  if (live && !live.repeat && live.phase === 'failed')
    return (
      <Notice kind="problem" title="The run ended early." className="mb-2">
        {live.error} {kept}
      </Notice>
    );
  if (run.status === 'running' && !isAtWork(live))
    return (
      <Notice title="Nobody works on it in this tab." className="mb-2">
        It is running in another tab, or that tab was closed. {kept}
      </Notice>
    );
  if (run.status === 'stopped')
    return (
      <Notice title="Stopped before its horizon." className="mb-2">
        {kept} Its series and digest were never made.
      </Notice>
    );
  return null;
}
