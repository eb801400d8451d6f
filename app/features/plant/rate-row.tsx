import { useId, useState } from 'react';
import { NumberField } from '#app/components/inputs.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import { beliefWords, cutWords, middleOf } from '#contract/belief-words.ts';
import type { RateSource, RateSources } from '#contract/plants.ts';
import type { AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';
import { readBelief, type BeliefDraft } from './belief-draft.ts';
import { BeliefEditor } from './belief-editor.tsx';
import { BeliefPicture } from './belief-picture.tsx';
import { typeRate, type RateSheet, type SheetErrors } from './rate-sheet.ts';

/** What is known of rates beside their values, and how it is changed. */
export interface RateKnowledge {
  readonly beliefs: { readonly [name in AnyRateName]?: BeliefDraft };
  readonly beliefErrors: { readonly [name in AnyRateName]?: Readonly<Record<string, string>> };
  readonly sources: RateSources;
  readonly onBelief: (name: AnyRateName, belief: BeliefDraft | undefined) => void;
  readonly onSource: (name: AnyRateName, source: RateSource | undefined) => void;
}

/** One rate: the blank, what it means, what is believed of it and why, and where it stands in its range. */
function RateRow(props: {
  name: AnyRateName;
  parameter: Parameter;
  typed: string;
  /** as it last made sense */
  value: number;
  error: string | undefined;
  editable: boolean;
  knowledge: RateKnowledge;
  onChange: (text: string) => void;
}) {
  const { name, parameter, knowledge, editable } = props;
  const { label, symbol, unit, meaning } = parameter;
  const draft = knowledge.beliefs[name];
  const errors = knowledge.beliefErrors[name];
  const [opened, setOpened] = useState(false);
  const id = useId();
  const belief = draft && readBelief(draft, parameter).belief;
  const open = editable && (opened || errors !== undefined);
  return (
    <div className="grid gap-x-6 gap-y-1 border-t border-rule-2 py-2.5 sm:grid-cols-[230px_minmax(0,1fr)]">
      <NumberField
        label={`${label}, ${symbol}`}
        unit={unit === '–' ? undefined : unit}
        hint={
          draft && (draft.law === 'triangular' ? 'the most likely value' : 'the middle of what is believed')
        }
        value={props.typed}
        readOnly={!editable || draft !== undefined}
        error={props.error}
        onChange={(event) => props.onChange(event.target.value)}
      />
      <div className="min-w-0 sm:pt-[22px]">
        <p className="text-[13.5px]">{meaning}.</p>
        {belief && (
          <div className="mt-1 flex flex-wrap items-center gap-x-4 gap-y-1">
            <BeliefPicture belief={belief} rate={parameter} />
            <p className="min-w-0 flex-1 basis-[180px] text-note">
              {beliefWords(belief)}
              {unit === '–' ? '' : ` ${unit}`}. {cutWords(belief, parameter)}
            </p>
          </div>
        )}
        <SourceWords parameter={parameter} source={knowledge.sources[name]} />
        <div className="flex flex-wrap items-center gap-x-5 gap-y-0.5">
          <RangeRule
            parameter={parameter}
            value={props.value}
            middle={belief && middleOf(belief, parameter)}
          />
          {editable && (
            <WordButton lined aria-expanded={open} aria-controls={id} onClick={() => setOpened(!open)}>
              {open ? 'Close' : draft ? 'Change belief or source' : 'Not sure? Say so'}
              <span className="sr-only"> for {label.toLowerCase()}</span>
            </WordButton>
          )}
        </div>
        <div id={id}>
          {open && (
            <BeliefEditor
              rate={parameter}
              value={props.value}
              belief={draft}
              errors={errors}
              source={knowledge.sources[name]}
              onBelief={(changed) => {
                setOpened(true);
                knowledge.onBelief(name, changed);
              }}
              onSource={(source) => knowledge.onSource(name, source)}
            />
          )}
        </div>
      </div>
    </div>
  );
}

function SourceWords({ parameter, source }: { parameter: Parameter; source: RateSource | undefined }) {
  const { unit, default: start } = parameter;
  if (!source)
    return (
      <p className="text-note text-ink-2">
        Starts at {formatNumber(start, 4)}: {parameter.source}
      </p>
    );
  const { sure, range } = source;
  return (
    <p className="mt-1 text-note text-ink-2">
      <b className="font-semibold text-ink">{sure[0].toUpperCase() + sure.slice(1)}</b>
      {source.source && `: ${source.source}`}
      {range && (
        <>
          {' '}
          Published: {formatNumber(range.low, 3)}
          {range.high > range.low && ` to ${formatNumber(range.high, 3)}`}
          {unit === '–' ? '' : ` ${unit}`}.
        </>
      )}
    </p>
  );
}

/** Rates of one table, one below the other. */
export function RateRows<Name extends AnyRateName>(props: {
  table: Readonly<Record<Name, Parameter>>;
  names: readonly Name[];
  sheet: RateSheet<Name>;
  errors: SheetErrors<Name>;
  editable: boolean;
  knowledge: RateKnowledge;
  onChange: (sheet: RateSheet<Name>) => void;
}) {
  const { table, sheet } = props;
  return props.names.map((name) => (
    <RateRow
      key={name}
      name={name}
      parameter={table[name]}
      typed={sheet.typed[name]}
      value={sheet.values[name]}
      error={props.errors[name]}
      editable={props.editable}
      knowledge={props.knowledge}
      onChange={(text) => props.onChange(typeRate(table, sheet, name, text))}
    />
  ));
}

const length = 240;

/**
 * The range of a rate as a rule: the tick is where it starts, the block where it stands, the bar nine tenths of what is
 * believed. Wide ranges by their logarithm.
 */
function RangeRule(props: {
  parameter: Parameter;
  value: number;
  middle: { low: number; high: number } | undefined;
}) {
  const { value, middle } = props;
  const { min, max, default: start } = props.parameter;
  const byLogarithm = min > 0 && max / min >= 100;
  const place = (x: number) =>
    length * (byLogarithm ? Math.log(x / min) / Math.log(max / min) : (x - min) / (max - min));
  return (
    <div
      aria-hidden="true"
      className="mt-1.5 flex min-w-0 flex-1 basis-[260px] items-center gap-2 font-mono text-axis text-ink-2"
    >
      <span className="w-11">{formatNumber(min, 4)}</span>
      <svg viewBox={`-4 0 ${length + 8} 12`} className="h-3 w-full max-w-[248px] overflow-visible">
        <path d={`M0 8.5H${length}`} className="stroke-rule" />
        <path d={`M0 5v7M${length} 5v7`} className="stroke-ink-3" />
        {middle && (
          <rect
            x={place(middle.low)}
            y={6.5}
            width={Math.max(1, place(middle.high) - place(middle.low))}
            height={4}
            className="fill-shore"
          />
        )}
        <path d={`M${place(start)} 4v8`} className="stroke-ink" />
        <rect x={place(value) - 3.5} y={5} width={7} height={7} className="fill-ink" />
      </svg>
      <span>{formatNumber(max, 4)}</span>
    </div>
  );
}
