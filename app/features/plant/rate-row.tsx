import { NumberField } from '#app/components/inputs.tsx';
import { formatNumber } from '#app/lib/formats.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';
import { typeRate, type RateSheet, type SheetErrors } from './rate-sheet.ts';

/** One rate: the blank, what it means, where its starting value comes from, and where it stands in its range. */
function RateRow(props: {
  parameter: Parameter;
  typed: string;
  /** as it last made sense */
  value: number;
  error: string | undefined;
  editable: boolean;
  onChange: (text: string) => void;
}) {
  const { label, symbol, unit, meaning, source, default: start } = props.parameter;
  return (
    <div className="grid gap-x-6 gap-y-1 border-t border-rule-2 py-2.5 sm:grid-cols-[230px_minmax(0,1fr)]">
      <NumberField
        label={`${label}, ${symbol}`}
        unit={unit === '–' ? undefined : unit}
        value={props.typed}
        readOnly={!props.editable}
        error={props.error}
        onChange={(event) => props.onChange(event.target.value)}
      />
      <div className="min-w-0 sm:pt-[22px]">
        <p className="text-[13.5px]">{meaning}.</p>
        <p className="text-note text-ink-2">
          Starts at {formatNumber(start, 4)}: {source}
        </p>
        <RangeRule parameter={props.parameter} value={props.value} />
      </div>
    </div>
  );
}

/** Rates of one table, one below the other. */
export function RateRows<Name extends string>(props: {
  table: Readonly<Record<Name, Parameter>>;
  names: readonly Name[];
  sheet: RateSheet<Name>;
  errors: SheetErrors<Name>;
  editable: boolean;
  onChange: (sheet: RateSheet<Name>) => void;
}) {
  const { table, sheet } = props;
  return props.names.map((name) => (
    <RateRow
      key={name}
      parameter={table[name]}
      typed={sheet.typed[name]}
      value={sheet.values[name]}
      error={props.errors[name]}
      editable={props.editable}
      onChange={(text) => props.onChange(typeRate(table, sheet, name, text))}
    />
  ));
}

const length = 240;

/** The range of a rate as a rule: the tick is where it starts, the block where it stands. Wide ranges by their logarithm. */
function RangeRule({ parameter, value }: { parameter: Parameter; value: number }) {
  const { min, max, default: start } = parameter;
  const byLogarithm = min > 0 && max / min >= 100;
  const place = (x: number) =>
    length * (byLogarithm ? Math.log(x / min) / Math.log(max / min) : (x - min) / (max - min));
  return (
    <div aria-hidden="true" className="mt-1.5 flex items-center gap-2 font-mono text-axis text-ink-2">
      <span className="w-11">{formatNumber(min, 4)}</span>
      <svg viewBox={`-4 0 ${length + 8} 12`} className="h-3 w-full max-w-[248px] overflow-visible">
        <path d={`M0 8.5H${length}`} className="stroke-rule" />
        <path d={`M0 5v7M${length} 5v7`} className="stroke-ink-3" />
        <path d={`M${place(start)} 4v8`} className="stroke-ink" />
        <rect x={place(value) - 3.5} y={5} width={7} height={7} className="fill-ink" />
      </svg>
      <span>{formatNumber(max, 4)}</span>
    </div>
  );
}
