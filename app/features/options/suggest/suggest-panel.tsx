import { BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import { NumberBlank } from '../board/sentence.tsx';
import { GainChart } from './gain-chart.tsx';
import type { Suggesting } from './use-suggest.ts';

/** Where more mounds would help most: asked for, awaited or cancelled, looked at, and taken into an option. */
export function SuggestPanel(props: {
  suggesting: Suggesting;
  /** ISO 4217; undefined where no costs are set */
  currency: string | undefined;
  /** what is being placed, in words */
  moundWords: string;
  /** the gain map is what the map shows */
  gainShown: boolean;
  onShowGain: (shown: boolean) => void;
  onAdd: () => void;
  onNewOption: () => void;
  busy: boolean;
}) {
  const { suggesting, currency, gainShown } = props;
  const { pen, setPen, problem, job, gain, taken } = suggesting;
  const gains = job.result?.footholds.map((foothold) => foothold.gain) ?? [];
  const sooner = gains.slice(0, taken).reduce((sum, years) => sum + years, 0);
  return (
    <section aria-label="Suggest" className="mt-4 border-t border-rule pt-2 text-[13.5px]">
      <h2 className="text-body font-bold">Suggest</h2>
      <p className="mt-0.5 flex flex-wrap items-baseline gap-x-1.5 gap-y-1">
        <span>Find places for</span>
        <NumberBlank
          label={pen.by === 'count' ? 'Number of mounds to suggest' : 'Budget for suggested mounds'}
          value={pen[pen.by]}
          error={problem}
          onChange={(text) => setPen({ ...pen, [pen.by]: text })}
        />
        <BlankSelect
          label="What the number means"
          value={pen.by}
          onChange={(event) => setPen({ ...pen, by: event.target.value === 'budget' ? 'budget' : 'count' })}
        >
          <option value="count">mounds</option>
          <option value="budget" disabled={currency === undefined}>
            {currency ?? 'of the budget'} of mounds
          </option>
        </BlankSelect>
        <span>where they help most, beside what is drawn. {props.moundWords}</span>
      </p>
      {problem !== undefined && <p className="text-note text-danger">{problem}</p>}
      {job.running || gain.running ? (
        <Working suggesting={suggesting} onShowGain={props.onShowGain} />
      ) : (
        <p className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1">
          <Button disabled={problem !== undefined} onClick={suggesting.suggest}>
            Suggest
          </Button>
          <WordButton
            lined
            pressed={gainShown || undefined}
            disabled={problem !== undefined && !gainShown}
            onClick={() => {
              props.onShowGain(!gainShown);
              if (!gainShown) suggesting.askGain();
            }}
          >
            {gainShown ? 'Back to closing years' : 'Where would one more help most?'}
          </WordButton>
        </p>
      )}
      {job.error || gain.error ? (
        <ProblemNotice
          error={job.error ?? gain.error}
          title="No places could be suggested."
          className="mt-2"
        />
      ) : null}
      {gainShown && gain.result && !gain.running && (
        <p role="status" className="mt-1 text-note text-ink-2">
          The map shows by how much one more mound would bring growth forward, on average over the ground: at
          most {formatNumber(gain.result.most, 3)} years, from {gain.result.candidates} places that were
          weighed.
        </p>
      )}
      {job.result && !job.running && (
        <div className="mt-2" role="status">
          {gains.length === 0 ? (
            <p>No place was found where a mound would bring growth forward.</p>
          ) : (
            <>
              <p>
                {formatCounted(taken, 'mound')}, shown faint, bring growth forward by{' '}
                <b className="font-bold">{formatNumber(sooner)} years</b> on average.{' '}
                {job.result.knee !== undefined &&
                  `After ${job.result.knee}, each further one buys clearly less.`}
              </p>
              <GainChart gains={gains} knee={job.result.knee} taken={taken} />
              <label className="mt-1 flex items-center gap-x-2">
                Take the first
                <input
                  type="range"
                  min={1}
                  max={gains.length}
                  value={taken}
                  aria-label="How many of the suggested mounds are taken"
                  className="min-w-0 flex-1 accent-ink"
                  onChange={(event) => suggesting.take(Number(event.target.value))}
                />
                <span className="w-7 text-right font-mono">{taken}</span>
              </label>
              <p className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1">
                <Button onClick={props.onAdd}>Add them here</Button>
                <Button busy={props.busy} onClick={props.onNewOption}>
                  As a new option
                </Button>
                <WordButton lined onClick={suggesting.forget}>
                  Leave them
                </WordButton>
              </p>
            </>
          )}
        </div>
      )}
    </section>
  );
}

function Working(props: { suggesting: Suggesting; onShowGain: (shown: boolean) => void }) {
  const { job, gain, again } = props.suggesting;
  const { progress } = job.running ? job : gain;
  const cancel = () => {
    if (job.running) return job.cancel();
    gain.cancel();
    props.onShowGain(false);
  };
  const label =
    progress?.stage === 'placing'
      ? `${progress.done} of ${progress.of} placed`
      : `${progress?.done ?? 0} of ${progress?.of ?? '…'} places weighed`;
  return (
    <div className="mt-2">
      {again && job.running && (
        <p role="status" className="text-note text-ink-2">
          The page was left while this was at work: it began again by itself.
        </p>
      )}
      <Progress
        label={label}
        done={progress?.done ?? 0}
        of={progress?.of ?? 1}
        secondsLeft={progress?.secondsLeft}
      />
      <WordButton lined className="mt-1" onClick={cancel}>
        Cancel
      </WordButton>
    </div>
  );
}
