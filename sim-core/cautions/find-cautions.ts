import type { Caution, ComparisonCaution } from '#sim-core/spec/caution.ts';
import { publishedFrontSpeed } from '#sim-core/spec/parameters.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import { fitKernel } from '#sim-core/theory/fit-kernel.ts';
import { recordDroughts } from '#sim-core/weather/record-droughts.ts';
import { shiftAfter } from '#sim-core/weather/trend.ts';
import { meanWait } from '#sim-core/weather/waiting-law.ts';
import type { YearIndex } from '#sim-core/weather/yearly-record.ts';

/** Droughts of a record below which little can be said of how they come back (common practice, no source). */
const fewDroughts = 5;

type CautionedSpec = Pick<
  RunSpec,
  'rates' | 'stepsPerYear' | 'years' | 'surveyYear' | 'droughtIndex' | 'trend' | 'layers' | 'actions'
>;

export interface CautionInput {
  readonly spec: CautionedSpec;
  /** m */
  readonly cellSize: number;
  /** the site's drought record by year, Palmer scale, ascending; undefined where it has none */
  readonly record: readonly YearIndex[] | undefined;
  /** what is published of the front speed of this very plant, m/yr; the product's own range unless said */
  readonly published?: PublishedSpeed | undefined;
}

export interface PublishedSpeed {
  readonly least: number;
  readonly most: number;
  readonly source: string;
}

/** Where a run believes more than its data say. Empty where nothing is to be said. */
export function findCautions({ spec, cellSize, record, published }: CautionInput): Caution[] {
  return [
    ...frontSpeedCautions(spec, published),
    ...coarseCautions(spec, cellSize),
    ...recordCautions(spec, record),
    ...trendCautions(spec),
    ...refugeCautions(spec),
  ];
}

/** The cautions of several runs that differ in their outlook alone: each once, with the outlooks that it is about. */
export function gatherCautions(
  byOutlook: readonly { readonly name: string; readonly cautions: readonly Caution[] }[],
): ComparisonCaution[] {
  const found = new Map<string, ComparisonCaution>();
  for (const { name, cautions } of byOutlook)
    for (const caution of cautions) {
      const held = found.get(caution.message);
      if (held) held.outlooks.push(name);
      else found.set(caution.message, { ...caution, outlooks: [name] });
    }
  return [...found.values()].map((caution) =>
    caution.outlooks.length === byOutlook.length ? { ...caution, outlooks: [] } : caution,
  );
}

const figure = (x: number) => String(Number(x.toPrecision(3))).replace('-', '−');

function frontSpeedCautions(
  { rates: { lateralSpread } }: CautionedSpec,
  { least, most, source }: PublishedSpeed = publishedFrontSpeed,
): Caution[] {
  if (lateralSpread >= least && lateralSpread <= most) return [];
  return [
    {
      code: 'front-speed-outside-published',
      message: `A front of ${figure(lateralSpread)} m/yr lies outside what is published, ${least} to ${most} m/yr (${source}). Measure it on the site.`,
      figures: { lateralSpread, least, most },
    },
  ];
}

function coarseCautions({ rates, stepsPerYear }: CautionedSpec, cellSize: number): Caution[] {
  try {
    const { warnings, frontSpeed, diagonalFrontSpeed } = fitKernel(rates, cellSize, stepsPerYear);
    return warnings.map((message) => ({
      code: 'cell-too-coarse' as const,
      message,
      figures: { cellSize, evenness: diagonalFrontSpeed / frontSpeed },
    }));
  } catch (error) {
    // Rates that no kernel can show are refused elsewhere, with the way out.
    if (error instanceof RunProblem) return [];
    throw error;
  }
}

function recordCautions(spec: CautionedSpec, record: readonly YearIndex[] | undefined): Caution[] {
  const { droughtIndex: source, years, rates, trend } = spec;
  if (!record || record.length === 0)
    return [
      {
        code: 'no-drought-record',
        message: 'The site has no drought record, so the weather to come rests on judgement alone.',
        figures: {},
      },
    ];
  const found: Caution[] = [];
  const recorded = record.length;
  const span = `${record[0].year} to ${record[recorded - 1].year}`;
  if (years > recorded)
    found.push({
      code: 'horizon-beyond-record',
      message: `The horizon of ${years} years is longer than the drought record of ${recorded} (${span}): rarer droughts than it can show may come.`,
      figures: { years, recorded },
    });
  const renewal =
    typeof source === 'object' && 'kind' in source && source.kind === 'renewal' ? source : undefined;
  const interval = renewal && meanWait(renewal.returnInterval);
  if (interval !== undefined && interval > recorded)
    found.push({
      code: 'interval-beyond-record',
      message: `Droughts that come back every ${figure(interval)} years on average cannot be read from a record of ${recorded} years.`,
      figures: { interval, recorded },
    });
  const { droughts } = recordDroughts(record, rates.tolerance);
  if (droughts.length < fewDroughts)
    found.push({
      code: 'few-droughts-in-record',
      message: `The record of ${span} holds ${droughts.length} ${droughts.length === 1 ? 'drought' : 'droughts'} at or below ${figure(rates.tolerance)}: how often they come back is hardly known.`,
      figures: { droughts: droughts.length, tolerance: rates.tolerance },
    });
  const driest = Math.min(...record.map(({ index }) => index));
  const believed = driestBelieved(spec);
  if (believed !== undefined && believed < driest - 0.05)
    found.push({
      code: 'drier-than-record',
      message: `The outlook reaches an index of ${figure(believed)}${trend?.shiftPerDecade ? ', its trend left out,' : ''} drier than the driest year on record (${figure(driest)}).`,
      figures: { believed, driest },
    });
  return found;
}

/** Driest index that a source names; weather around a mean names none. */
function driestBelieved({ droughtIndex: source }: CautionedSpec): number | undefined {
  if (typeof source === 'number') return source;
  if (Array.isArray(source)) return source.length > 0 ? Math.min(...source) : undefined;
  if (source.kind === 'renewal') return source.depth;
  return source.kind === 'series' ? Math.min(...source.values.map(({ value }) => value)) : undefined;
}

function trendCautions({ trend, years }: CautionedSpec): Caution[] {
  if (!trend) return [];
  const shift = shiftAfter(trend, years);
  const { frequencyPerDecade: frequency = 1 } = trend;
  if (shift === 0 && frequency === 1) return [];
  const parts = [
    ...(shift === 0
      ? []
      : [`an index ${figure(Math.abs(shift))} ${shift < 0 ? 'lower' : 'higher'} by the horizon`]),
    ...(frequency === 1 ? [] : [`droughts ${figure(frequency)} times as often after each decade`]),
  ];
  return [
    {
      code: 'trend-assumed',
      message: `A trend is assumed: ${parts.join(' and ')}. No record can show that it goes on.`,
      figures: { shift, frequency },
    },
  ];
}

function refugeCautions({ layers, actions, rates }: CautionedSpec): Caution[] {
  if (layers.refuge !== 0 || rates.refugeShift === 0) return [];
  if (actions.some(({ kind }) => kind === 'mound')) return [];
  return [
    {
      code: 'no-refuge',
      message:
        'No refuge is surveyed on the site: whatever shelters survivors there is left out, so droughts may be told as worse than they are.',
      figures: {},
    },
  ];
}
