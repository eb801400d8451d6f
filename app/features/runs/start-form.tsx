import { useState } from 'react';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { CautionList } from '#app/components/caution-list.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { formatCount, formatDuration } from '#app/lib/formats.ts';
import { findCautions } from '#sim-core/cautions/find-cautions.ts';
import type { Mode, RunSpec } from '#sim-core/spec/run-spec.ts';
import { composeRunSpec } from './compose-run-spec.ts';
import { CompositionProblems } from './composition-problems.tsx';
import { randomSeed } from './random-seed.ts';
import { mostFutures, readFuture } from './read-future.ts';
import { RunOutlook } from './run-outlook.tsx';
import { estimateSeconds } from './run-pace.ts';
import { modeWords } from './run-words.ts';

export interface StartedRun {
  name: string;
  optionId: string;
  spec: RunSpec;
}

/** A run as a sentence with blanks; what stands in its way is said where it stands, with the page that mends it. */
export function StartForm(props: {
  site: Site;
  options: readonly Option[];
  /** the option that the page was asked to run */
  startId: string | undefined;
  /** names that are taken, so that a new one can be told apart */
  names: readonly string[];
  /** the newest finished run of Wait: with its seed, the difference is what the works did */
  waitRun: { name: string; seed: string; mode: string } | undefined;
  busy: boolean;
  error: unknown;
  onStart: (run: StartedRun) => void;
}) {
  const { site, options, names, waitRun } = props;
  const [optionId, setOptionId] = useState(
    options.find(({ id }) => id === props.startId)?.id ?? options[0].id,
  );
  const option = options.find(({ id }) => id === optionId) ?? options[0];
  const [typed, setTyped] = useState<string>();
  const [drawnSeed] = useState(() => randomSeed());
  const [typedSeed, setSeed] = useState<string>();
  const [mode, setMode] = useState<Mode>('counts');
  const [outlookId, setOutlookId] = useState<string>();
  const [listed, setListed] = useState(false);
  const [typedFuture, setFuture] = useState('1');
  const outlook = site.otherOutlooks.find(({ id }) => id === outlookId) ?? site.outlook;
  const takesDrawn = outlook.drawn !== null && !listed;
  const future = readFuture(typedFuture);
  const futureProblem =
    takesDrawn && future === undefined
      ? `Found “${typedFuture}” as the future; a whole number from 1 to ${formatCount(mostFutures)} is expected.`
      : undefined;
  // Options share the luck of Wait unless the person says otherwise.
  const seed = typedSeed ?? (option.wait ? undefined : waitRun?.seed) ?? drawnSeed;
  const sharesLuck = waitRun !== undefined && !option.wait && seed === waitRun.seed && mode === 'counts';
  const name = typed ?? freeName(option.name, names);
  const { surveyYear, years, stepsPerYear } = outlook;
  const composed = composeRunSpec(site, option, {
    mode,
    seed,
    outlook,
    future: takesDrawn ? (future ?? 1) : undefined,
  });
  const problems = composed.problems ?? [];
  const nameProblem = name.trim() === '' ? 'Give the run a name.' : undefined;
  const ownProblems = problems.filter((problem) => problem.mend === 'form');
  const cells = site.grid.width * site.grid.height;
  const seconds = estimateSeconds(mode, cells, years * stepsPerYear);
  const start = () => {
    if (composed.spec && !nameProblem && !futureProblem)
      props.onStart({ name: name.trim(), optionId: option.id, spec: composed.spec });
  };
  return (
    <form
      aria-label="Start a run"
      onSubmit={(event) => {
        event.preventDefault();
        start();
      }}
    >
      <p className="flex flex-wrap items-baseline gap-x-1.5 gap-y-2 text-lead leading-loose">
        <span>Run</span>
        <BlankSelect
          label="Option to run"
          className="max-w-full text-[15px]"
          value={option.id}
          onChange={(event) => setOptionId(event.target.value)}
        >
          {options.map(({ id, name: words }) => (
            <option key={id} value={id}>
              {words}
            </option>
          ))}
        </BlankSelect>
        <span>from the survey of {surveyYear} to</span>
        <b>{surveyYear + years}</b>
        <RunOutlook
          {...{ site, outlook, listed, futureProblem }}
          future={typedFuture}
          onOutlook={setOutlookId}
          onListed={setListed}
          onFuture={setFuture}
        />
        <span>with the seed</span>
        <Blank
          label="Seed, from which every draw of chance follows"
          error={ownProblems.find(({ field }) => field === 'seed')?.message}
          className="max-w-full"
          value={seed}
          characters={Math.max(8, seed.length)}
          maxLength={200}
          onChange={(event) => setSeed(event.target.value)}
        />
        <WordButton lined onClick={() => setSeed(randomSeed())}>
          another seed
        </WordButton>
        {waitRun && !option.wait && seed !== waitRun.seed && (
          <WordButton lined onClick={() => setSeed(undefined)}>
            same luck as “{waitRun.name}”
          </WordButton>
        )}
        <span>and keep it as</span>
        <Blank
          label="Name of the run"
          error={nameProblem}
          className="max-w-full font-sans"
          value={name}
          characters={Math.min(44, Math.max(12, name.length))}
          maxLength={120}
          onChange={(event) => setTyped(event.target.value)}
        />
      </p>
      <div className="mt-2 flex flex-wrap items-baseline gap-x-5 gap-y-1">
        <WordChoice
          label="Chance"
          showLabel
          options={[
            { key: 'counts', label: modeWords.counts.name },
            { key: 'mean-field', label: modeWords['mean-field'].name },
          ]}
          value={mode}
          onChange={setMode}
        />
        <span className="text-note text-ink-2">{modeWords[mode].means}</span>
      </div>
      {sharesLuck && (
        <p className="mt-1 text-note text-ink-2">
          {waitRun.mode === mode
            ? `The seed is that of “${waitRun.name}”, so both share their luck: under the same outlook${outlook.drawn ? ' and in the same future' : ''}, what differs is what the works did.`
            : `The seed is that of “${waitRun.name}”, but that run was without chance, so they do not share their luck.`}
        </p>
      )}
      {futureProblem && (
        <p role="alert" className="mt-1 text-note text-danger">
          {futureProblem}
        </p>
      )}
      <CompositionProblems problems={problems} nameProblem={nameProblem} site={site} optionId={option.id} />
      {composed.spec && (
        <div className="mt-2">
          <CautionList
            cautions={findCautions({
              spec: composed.spec,
              cellSize: site.grid.cellSize,
              record: site.droughtRecord?.years,
            })}
          />
        </div>
      )}
      {props.error ? (
        <ProblemNotice error={props.error} title="The run was not started." className="mt-3" />
      ) : null}
      <div className="mt-3 flex flex-wrap items-center gap-x-4 gap-y-1">
        <Button
          kind="primary"
          type="submit"
          busy={props.busy}
          busyLabel="Starting"
          disabled={composed.spec === undefined || nameProblem !== undefined || futureProblem !== undefined}
        >
          Start the run
        </Button>
        <span className="text-note text-ink-2">
          {formatCount(cells)} cells over {years * stepsPerYear} {stepsPerYear === 1 ? 'years' : 'steps'}:{' '}
          {seconds < 5 ? 'a few seconds' : `about ${formatDuration(seconds)}`} on this browser. You can leave
          the page, but not close the tab.
        </span>
      </div>
    </form>
  );
}

/** `Wait, run 2`: the first number that is free. */
function freeName(option: string, taken: readonly string[]): string {
  for (let n = 1; ; n++) {
    const name = `${option.slice(0, 100)}, run ${n}`;
    if (!taken.includes(name)) return name;
  }
}
