import { Link } from 'react-router-dom';
import type { RunSummary } from '#contract/runs.ts';
import { Table } from '#app/components/table.tsx';
import { Menu, MenuItem } from '#app/components/menu.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { isAtWork, type LiveRun } from './run-manager.ts';
import { RunSpan } from './run-span.tsx';
import { checkWords, recoveryWords, shortDigest, statusWords } from './run-words.ts';

/** Runs of a site, newest first. */
export function RunTable(props: {
  runs: readonly RunSummary[];
  live: readonly LiveRun[];
  mayChange: boolean;
  onRename: (run: RunSummary) => void;
  onDelete: (run: RunSummary) => void;
  onStop: (run: RunSummary) => void;
}) {
  const liveOf = (run: RunSummary) => props.live.find(({ runId }) => runId === run.id);
  return (
    <Table
      caption="Runs of this site, newest first"
      rows={props.runs}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'name',
          head: 'run',
          cell: (run) => (
            <>
              <Link
                to={`/sites/${run.siteId}/runs/${run.id}`}
                className="inline-block min-h-6 touch:min-h-11 text-body font-bold"
              >
                {run.name}
              </Link>
              <span className="block text-note text-ink-2">
                {run.optionName}; started {formatDateTime(run.startedAt)} by {run.startedBy}
              </span>
              <span className="block text-note md:hidden">
                {recoveryWords(run) ?? statusWords(run, liveOf(run))}
              </span>
            </>
          ),
        },
        {
          key: 'came',
          head: 'what came of it',
          wide: true,
          cell: (run) => {
            const live = liveOf(run);
            const stored = live && !live.repeat && isAtWork(live) ? live.savedYears.length : run.frames;
            return (
              <>
                <b className="text-body font-semibold">{recoveryWords(run) ?? statusWords(run, live)}</b>
                {live?.repeat && isAtWork(live) && (
                  <span className="block text-note">{statusWords(run, live)}</span>
                )}
                <RunSpan {...run} stored={stored} />
              </>
            );
          },
        },
        {
          key: 'years',
          head: 'years',
          wide: true,
          cell: (run) => `${run.surveyYear} to ${run.surveyYear + run.years}`,
        },
        {
          key: 'seed',
          head: 'seed',
          wide: true,
          cell: (run) => <span className="font-mono text-note break-all">{run.seed}</span>,
        },
        {
          key: 'digest',
          head: 'digest, run again',
          wide: true,
          cell: (run) => (
            <>
              <span className="block font-mono text-note" title={run.digest ?? undefined}>
                {run.digest ? shortDigest(run.digest) : '–'}
              </span>
              {run.status === 'finished' && <span className="text-note text-ink-2">{checkWords(run)}</span>}
            </>
          ),
        },
        ...(props.mayChange
          ? [
              {
                key: 'deeds',
                head: <span className="sr-only">deeds</span>,
                number: true,
                cell: (run: RunSummary) => (
                  <Menu trigger={<WordButton lined>More</WordButton>}>
                    <MenuItem onSelect={() => props.onRename(run)}>Rename</MenuItem>
                    {run.status === 'running' && (
                      <MenuItem onSelect={() => props.onStop(run)}>Stop, keep what is stored</MenuItem>
                    )}
                    <MenuItem onSelect={() => props.onDelete(run)}>Delete</MenuItem>
                  </Menu>
                ),
              },
            ]
          : []),
      ]}
    />
  );
}
