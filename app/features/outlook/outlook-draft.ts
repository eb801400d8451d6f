import { outlookSchema, type Outlook } from '#contract/outlooks.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { maximumYears } from '#sim-core/spec/limits.ts';
import type { Boundary, StepsPerYear } from '#sim-core/spec/run-spec.ts';
import { shiftAfter } from '#sim-core/weather/trend.ts';
import { drawnWeather, startDrawn, type DrawnDraft } from './drawn-draft.ts';
import { outlookChanges, startChanges, type ChangesDraft } from './changes-draft.ts';
import type { SeriesEntry } from './read-series.ts';

/**
 * An outlook while it is edited. Values belong to calendar years and are kept beyond the horizon, so that a shorter
 * horizon or another survey year loses nothing until it is saved.
 */
export interface OutlookDraft {
  /** as typed */
  readonly surveyYear: string;
  readonly years: string;
  readonly stepsPerYear: StepsPerYear;
  readonly boundary: Boundary;
  readonly values: ReadonlyMap<number, number>;
  readonly drawn: DrawnDraft;
  readonly changes: ChangesDraft;
  readonly name: string;
  /** survey year and horizon as they last made sense: what the drawing shows while somebody types */
  readonly span: { readonly surveyYear: number; readonly years: number };
}

export type OutlookEvent =
  | { type: 'surveyYear' | 'years'; text: string }
  | { type: 'stepsPerYear'; value: StepsPerYear }
  | { type: 'boundary'; value: Boundary }
  | { type: 'value'; year: number; value: number }
  | { type: 'constant'; value: number }
  | { type: 'laid'; values: ReadonlyMap<number, number> }
  | { type: 'drawn'; change: Partial<DrawnDraft> }
  | { type: 'changes'; change: Partial<ChangesDraft> }
  | { type: 'name'; name: string }
  | { type: 'reset'; outlook: Outlook };

export function startDraft(outlook: Outlook): OutlookDraft {
  const { surveyYear, years, stepsPerYear, boundary, droughtIndex, drawn, name } = outlook;
  return {
    surveyYear: String(surveyYear),
    years: String(years),
    stepsPerYear,
    boundary,
    values: new Map(droughtIndex.map((value, i) => [surveyYear + 1 + i, value])),
    drawn: startDrawn(
      drawn,
      droughtIndex.map((value, i) => ({ year: surveyYear + 1 + i, value })),
    ),
    changes: startChanges(outlook),
    name,
    span: { surveyYear, years },
  };
}

export function outlookDraft(draft: OutlookDraft, event: OutlookEvent): OutlookDraft {
  switch (event.type) {
    case 'surveyYear':
    case 'years': {
      const next = { ...draft, [event.type]: event.text };
      const [least, most] = limits[event.type];
      const value = wholeIn(event.text, least, most);
      return value === undefined ? next : { ...next, span: { ...draft.span, [event.type]: value } };
    }
    case 'stepsPerYear':
      return { ...draft, stepsPerYear: event.value };
    case 'boundary':
      return { ...draft, boundary: event.value };
    case 'value':
      return { ...draft, values: new Map(draft.values).set(event.year, tidy(event.value)) };
    case 'constant':
      return { ...draft, values: new Map(simulatedYears(draft).map((year) => [year, tidy(event.value)])) };
    case 'laid':
      return { ...draft, values: new Map([...draft.values, ...event.values]) };
    case 'drawn':
      return { ...draft, drawn: { ...draft.drawn, ...event.change } };
    case 'changes':
      return { ...draft, changes: { ...draft.changes, ...event.change } };
    case 'name':
      return { ...draft, name: event.name };
    case 'reset':
      return startDraft(event.outlook);
  }
}

const limits = { surveyYear: [1000, 9000], years: [1, maximumYears] } as const;
export const driest = -15;
export const wettest = 15;

function wholeIn(text: string, least: number, most: number): number | undefined {
  const value = parseNumber(text);
  return value !== undefined && Number.isInteger(value) && value >= least && value <= most
    ? value
    : undefined;
}

/** Within the scale, and to a hundredth: nobody knows a drought index better. */
const tidy = (value: number) => Math.round(Math.min(wettest, Math.max(driest, value)) * 100) / 100 || 0;

/** The years that the drawing shows, ascending. */
export const simulatedYears = ({ span }: Pick<OutlookDraft, 'span'>): number[] =>
  Array.from({ length: span.years }, (_, i) => span.surveyYear + 1 + i);

/** The index of a year; years that nobody has said anything about are near normal. */
export const indexOf = (draft: OutlookDraft, year: number): number => draft.values.get(year) ?? 0;

/** The index that acts in a year of the list: as listed, with what the trend has added by its end. */
export function actingIndex(draft: OutlookDraft, year: number): number {
  const shift = parseNumber(draft.changes.shiftPerDecade) ?? 0;
  return tidy(indexOf(draft, year) + shiftAfter({ shiftPerDecade: shift }, year - draft.span.surveyYear));
}

/** What is wrong, by field; empty when the draft can be saved. */
export function draftErrors(draft: OutlookDraft): { surveyYear?: string; years?: string } {
  const errors: { surveyYear?: string; years?: string } = {};
  for (const field of ['surveyYear', 'years'] as const) {
    const [least, most] = limits[field];
    if (wholeIn(draft[field], least, most) === undefined)
      errors[field] =
        `Found “${draft[field].trim()}”; ${field === 'years' ? 'a number of years' : 'a year'} from ${least} to ${most} is expected`;
  }
  return errors;
}

/** The outlook that the draft stands for; undefined while something is wrong. */
export function draftOutlook(draft: OutlookDraft): Outlook | undefined {
  if (Object.keys(draftErrors(draft)).length > 0) return undefined;
  const { stepsPerYear, boundary, span } = draft;
  const listed = simulatedYears(draft).map((year) => ({ year, value: indexOf(draft, year) }));
  const drawn = drawnWeather(draft.drawn, listed);
  const changes = outlookChanges(draft.changes);
  if (drawn === undefined || changes === undefined) return undefined;
  const outlook = outlookSchema.safeParse({
    ...span,
    stepsPerYear,
    boundary,
    droughtIndex: listed.map(({ value }) => value),
    drawn,
    ...changes,
    name: draft.name,
  });
  return outlook.data;
}

/** How a series is laid over the years to come. */
export type Laying = 'by-year' | 'in-order';

export interface LaidSeries {
  readonly values: ReadonlyMap<number, number>;
  /** simulated years that the series gives a value */
  readonly set: number;
  /** simulated years that it says nothing about: they keep what they have */
  readonly kept: number;
  /** values of the series that fall outside the simulated years */
  readonly unused: number;
}

/** Lays a series over the simulated years: by the years it names, or value by value from the first year on. */
export function layOver(draft: OutlookDraft, entries: readonly SeriesEntry[], how: Laying): LaidSeries {
  const first = draft.span.surveyYear + 1;
  const last = draft.span.surveyYear + draft.span.years;
  const values = new Map<number, number>();
  entries.forEach(({ year, value }, i) => {
    const at = how === 'by-year' ? year : first + i;
    if (at !== undefined && at >= first && at <= last) values.set(at, tidy(value));
  });
  return {
    values,
    set: values.size,
    kept: draft.span.years - values.size,
    unused: entries.length - values.size,
  };
}
