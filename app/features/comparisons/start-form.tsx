import { useState, type ReactNode } from 'react';
import { mostOutlooks } from '#contract/comparisons.ts';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { Blank, BlankSelect } from '#app/components/blank.tsx';
import { Button } from '#app/components/button.tsx';
import { CautionList } from '#app/components/caution-list.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { formatCount, formatDuration, formatNumber } from '#app/lib/formats.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { findCautions, gatherCautions } from '#sim-core/cautions/find-cautions.ts';
import { allParameters, anyRateNames } from '#sim-core/spec/all-parameters.ts';
import type { Mode, RunSpec } from '#sim-core/spec/run-spec.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import type { StartBody } from './change-comparison.ts';
import { mapYears, startBody } from './compose-plan.ts';
import { mainOutlookKey, offeredOutlooks } from './offered-outlooks.ts';

/** What an option costs on this site, and in what; null where no costs are set. */
export interface KnownCost {
  readonly total: number;
  readonly currency: string;
}

type StopKind = 'all' | 'chances' | 'rank';
const stops: Record<StopKind, string> = {
  all: 'when all are done',
  chances: 'when every chance is known to ± 5 of 100',
  rank: 'when the best leads the second for sure',
};
const modes: Record<Mode, string> = {
  counts: 'with chance, clump by clump',
  'mean-field': 'without chance in growth',
};

/** A comparison as a sentence with blanks: which options, under which weather, how many futures of each. */
export function ComparisonStartForm(props: {
  site: Site;
  options: readonly Option[];
  /** the run of an option, or nothing while something stands in its way */
  compose: (option: Option, mode: Mode, seed: string) => RunSpec | undefined;
  /** what stands in the way of an option's run, said with the page that mends it */
  problems: (option: Option, mode: Mode, seed: string) => ReactNode;
  costOf: (option: Option) => KnownCost | null;
  /** prices and budget of the site; null where nobody has set any */
  unitCosts: UnitCosts | null;
  /** seconds that one run takes on this browser */
  secondsOf: (mode: Mode) => number;
  drawSeed: () => string;
  /** names that are taken */
  names: readonly string[];
  busy: boolean;
  error: unknown;
  onStart: (body: StartBody) => void;
}) {
  const { site, options } = props;
  const [left, setLeft] = useState<ReadonlySet<string>>(new Set());
  const [under, setUnder] = useState<ReadonlySet<string>>(new Set([mainOutlookKey]));
  const believed = anyRateNames.filter((name) => site.plant.beliefs[name] !== undefined);
  const [asBelieved, setAsBelieved] = useState(true);
  const [mode, setMode] = useState<Mode>('counts');
  const [seed, setSeed] = useState(() => props.drawSeed());
  const [typed, setTyped] = useState('60');
  const [stop, setStop] = useState<StopKind>('all');
  const [typedThreshold, setThreshold] = useState(String(site.plant.rates.tolerance));
  const [typedName, setName] = useState<string>();
  const chosen = options.filter(({ id }) => !left.has(id)).slice(0, 8);
  const replicates = parseNumber(typed);
  const replicatesFit =
    replicates !== undefined && Number.isInteger(replicates) && replicates >= 2 && replicates <= 2000;
  const threshold = parseNumber(typedThreshold);
  const thresholdFits = threshold !== undefined && Math.abs(threshold) <= 15;
  const name =
    typedName ??
    freeName(
      chosen.map((option) => option.name),
      props.names,
    );
  const offered = offeredOutlooks(site);
  const outlooks = offered.filter(({ key }) => under.has(key)).map(({ outlook }) => outlook);
  const composed = chosen.map((option) => {
    const cost = props.costOf(option);
    return { optionId: option.id, cost: cost?.total ?? null, spec: props.compose(option, mode, seed) };
  });
  const [first] = composed;
  const cautions = first?.spec
    ? gatherCautions(
        outlooks.map(({ name: outlook, droughtIndex, trend }) => ({
          name: outlook,
          cautions: findCautions({
            spec: { ...first.spec!, droughtIndex, trend },
            cellSize: site.grid.cellSize,
            record: site.droughtRecord?.years,
          }),
        })),
      )
    : [];
  const ready = composed.flatMap(({ spec, ...rest }) => (spec ? [{ ...rest, spec }] : []));
  // An empty seed is said beside the sentence, not as a fault of the site.
  const blocked = seed.trim() === '' ? -1 : composed.findIndex(({ spec }) => !spec);
  const runs = chosen.length * outlooks.length * (replicatesFit ? replicates : 0);
  const workers = navigator.hardwareConcurrency || 2;
  const seconds = (runs * props.secondsOf(mode)) / workers;
  const { surveyYear, years } = site.outlook;
  const cells = site.grid.width * site.grid.height;
  const kept = mapYears(surveyYear, years, cells, Math.max(1, chosen.length * outlooks.length)).length;
  const wrong = {
    outlooks:
      outlooks.length === 0
        ? 'Choose at least one outlook.'
        : outlooks.length > mostOutlooks
          ? `Found ${outlooks.length} outlooks; up to ${mostOutlooks} can be compared at once.`
          : undefined,
    // Where there is one option only, nothing was done wrong yet; what to do is said beside the list.
    options:
      chosen.length < 2 && options.length > 1
        ? 'Choose at least two options; Wait is one of them.'
        : undefined,
    replicates: replicatesFit
      ? undefined
      : `Found “${typed}” futures; a whole number from 2 to 2000 is expected.`,
    seed: seed.trim() === '' ? 'There is no seed; type one, or take another.' : undefined,
    threshold: thresholdFits
      ? undefined
      : `Found “${typedThreshold}” as the index of a drought; a number from −15 to 15 is expected.`,
    name: name.trim() === '' ? 'Give the comparison a name.' : undefined,
  };
  const said = Object.values(wrong).filter((words) => words !== undefined);
  const fits = chosen.length > 1 && replicatesFit && thresholdFits && said.length === 0 && blocked < 0;
  const toggle = (set: ReadonlySet<string>, key: string) => {
    const next = new Set(set);
    if (!next.delete(key)) next.add(key);
    return next;
  };
  return (
    <form
      aria-label="Start a comparison"
      onSubmit={(event) => {
        event.preventDefault();
        if (!fits) return;
        props.onStart(
          startBody({
            name: name.trim(),
            options: ready,
            outlooks,
            replicates,
            stop:
              stop === 'all'
                ? null
                : stop === 'chances'
                  ? { atLeast: Math.min(20, replicates), halfWidth: 0.05 }
                  : { atLeast: Math.min(20, replicates), rankSettled: true },
            droughtThreshold: threshold,
            currency: props.unitCosts?.currency ?? null,
            unitCosts: props.unitCosts,
            cells,
            beliefs: asBelieved ? site.plant.beliefs : undefined,
          }),
        );
      }}
    >
      <fieldset>
        <legend className="text-lead">Compare these options</legend>
        <Ticks
          entries={options.map(({ id, name: words }) => ({ key: id, label: words, on: !left.has(id) }))}
          onToggle={(id) => setLeft(toggle(left, id))}
        />
      </fieldset>
      <fieldset className="mt-2">
        <legend className="text-[13.5px] text-ink-2">
          under {outlooks.length === 1 ? 'this outlook' : 'each of these outlooks'}
        </legend>
        <Ticks
          entries={offered.map(({ key, label }) => ({ key, label, on: under.has(key) }))}
          onToggle={(key) => setUnder(toggle(under, key))}
        />
      </fieldset>
      <p className="mt-2 flex flex-wrap items-baseline gap-x-1.5 gap-y-2 text-[14.5px] leading-loose">
        <span>in</span>
        <Blank
          label="Futures of each option"
          inputMode="numeric"
          characters={5}
          value={typed}
          error={wrong.replicates}
          onChange={(event) => setTyped(event.target.value)}
        />
        <span>futures each,</span>
        <BlankSelect label="Chance" value={mode} onChange={(event) => setMode(event.target.value as Mode)}>
          {Object.entries(modes).map(([key, words]) => (
            <option key={key} value={key}>
              {words}
            </option>
          ))}
        </BlankSelect>
        {believed.length > 0 && (
          <>
            <span>with rates</span>
            <BlankSelect
              label="Rates that are not known exactly"
              value={asBelieved ? 'believed' : 'fixed'}
              onChange={(event) => setAsBelieved(event.target.value === 'believed')}
            >
              <option value="believed">as believed, drawn by each future</option>
              <option value="fixed">fixed, as in a single run</option>
            </BlankSelect>
          </>
        )}
        <span>from the seed</span>
        <Blank
          label="Seed, from which the luck that all options share follows"
          characters={Math.max(8, seed.length)}
          maxLength={200}
          value={seed}
          error={wrong.seed}
          onChange={(event) => setSeed(event.target.value)}
        />
        <WordButton lined onClick={() => setSeed(props.drawSeed())}>
          another seed
        </WordButton>
        <span>A year at or below</span>
        <Blank
          label="Index at or below which a year counts as the next drought"
          inputMode="decimal"
          characters={5}
          value={typedThreshold}
          error={wrong.threshold}
          onChange={(event) => setThreshold(event.target.value)}
        />
        <span>counts as the next drought. Stop</span>
        <BlankSelect
          label="When to stop"
          value={stop}
          onChange={(event) => setStop(event.target.value as StopKind)}
        >
          {Object.entries(stops).map(([key, words]) => (
            <option key={key} value={key}>
              {words}
            </option>
          ))}
        </BlankSelect>
        <span>and keep it as</span>
        <Blank
          label="Name of the comparison"
          className="max-w-full font-sans"
          characters={Math.min(44, Math.max(14, name.length))}
          maxLength={120}
          value={name}
          error={wrong.name}
          onChange={(event) => setName(event.target.value)}
        />
      </p>
      {options.length < 2 && (
        <p className="text-note">
          A comparison takes two options or more, and this site has{' '}
          {options.length === 0 ? 'none' : `only ${options[0].name}`}.{' '}
          <WordLink to={`/sites/${site.id}/options`}>Draw one on Options</WordLink>
        </p>
      )}
      {said.length > 0 && (
        <p role="alert" className="text-note text-danger">
          {said.join(' ')}
        </p>
      )}
      <CautionList cautions={cautions} />
      {blocked >= 0 && props.problems(chosen[blocked], mode, seed)}
      {props.error ? (
        <ProblemNotice error={props.error} title="The comparison was not started." className="mt-3" />
      ) : null}
      <div className="mt-3 flex flex-wrap items-center gap-x-4 gap-y-1">
        <Button kind="primary" type="submit" disabled={!fits} busy={props.busy} busyLabel="Starting">
          Start the comparison
        </Button>
        <span className="text-note text-ink-2">
          {formatCount(runs)} runs on {formatNumber(workers, 0)} cores:{' '}
          {seconds < 10 ? 'some seconds' : `about ${formatDuration(seconds)}`} on this browser. Options share
          weather and luck, so their difference is what the works do.{' '}
          {believed.length > 0 &&
            asBelieved &&
            `Each future draws ${believed.map((name) => allParameters[name].label.toLowerCase()).join(', ')} anew, the same for every option. `}
          Maps of {kept === years + 1 ? 'every year' : `${kept} of ${years} years`} are kept.
        </span>
      </div>
    </form>
  );
}

function Ticks(props: {
  entries: readonly { key: string; label: string; on: boolean }[];
  onToggle: (key: string) => void;
}) {
  return (
    <div className="flex flex-wrap gap-x-5">
      {props.entries.map(({ key, label, on }) => (
        <label
          key={key}
          className="inline-flex min-h-7 cursor-pointer items-center gap-2 text-[14px] touch:min-h-11"
        >
          <input
            type="checkbox"
            className="size-4 accent-ink"
            checked={on}
            onChange={() => props.onToggle(key)}
          />
          <span className={on ? 'font-semibold' : ''}>{label}</span>
        </label>
      ))}
    </div>
  );
}

function freeName(options: readonly string[], taken: readonly string[]): string {
  const first =
    options.length < 2
      ? 'Comparison'
      : `${options.slice(0, 2).join(' or ')}${options.length > 2 ? ' and others' : ''}`;
  const name = first.slice(0, 100);
  for (let n = 1; ; n++) {
    const numbered = n === 1 ? name : `${name} (${n})`;
    if (!taken.includes(numbered)) return numbered;
  }
}
