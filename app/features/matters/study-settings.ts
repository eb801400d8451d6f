import type { ComparisonPlan } from '#contract/comparisons.ts';
import { studyMethods, type StudyMethod } from '#sim-core/matters/study-design.ts';
import type { StudyMeasure } from '#sim-core/matters/study-measure.ts';

/** What the page asks, as its address says it. */
export interface StudySettings {
  /** places in the plan; `than` undefined: one option alone */
  readonly option: number;
  readonly than: number | undefined;
  readonly outlook: number;
  readonly measure: StudyMeasure;
  readonly method: StudyMethod;
  readonly size: number;
  readonly luck: boolean;
}

/** How large a study is at first, at least and at most, by what it counts. */
export const studySizes: Record<StudyMethod, { usual: number; least: number; most: number; unit: string }> = {
  'one-at-a-time': { usual: 4, least: 1, most: 64, unit: 'futures' },
  screening: { usual: 10, least: 2, most: 200, unit: 'walks' },
  indices: { usual: 64, least: 16, most: 2048, unit: 'rows' },
};

const whole = (text: string | null, least: number, most: number): number | undefined => {
  const number = text === null || text === '' ? NaN : Number(text);
  return Number.isInteger(number) && number >= least && number <= most ? number : undefined;
};

/** What an address asks; what it does not say, or says wrongly, is as usual. */
export function readSettings(
  search: URLSearchParams,
  { options, outlooks, common }: ComparisonPlan,
): StudySettings {
  const firstWorks = options.findIndex(({ wait }) => !wait);
  const option = whole(search.get('option'), 0, options.length - 1) ?? Math.max(0, firstWorks);
  const than = whole(search.get('than'), 0, options.length - 1);
  const kind = search.get('measure');
  const last = common.surveyYear + common.years;
  const year = whole(search.get('year'), common.surveyYear + 1, last) ?? last;
  const method = studyMethods.find((name) => name === search.get('method')) ?? 'one-at-a-time';
  const { usual, least, most } = studySizes[method];
  return {
    option,
    than: than === option ? undefined : than,
    outlook: whole(search.get('outlook'), 0, outlooks.length - 1) ?? 0,
    measure: kind === 'covered' || kind === 'closed' ? { kind, year } : { kind: 'recovery' },
    method,
    size: whole(search.get('size'), least, most) ?? usual,
    luck: search.get('luck') !== 'common',
  };
}

/** What is measured, as a sentence goes on with it: `years to recovery of “Mounds” less those of “Wait”`. */
export function measuredWords({ option, than, measure }: StudySettings, { options }: ComparisonPlan): string {
  const name = (place: number) => `“${options[place].name}”`;
  const what =
    measure.kind === 'recovery'
      ? 'years to recovery'
      : measure.kind === 'covered'
        ? `the covered area in ${measure.year}`
        : `the share closed by ${measure.year}`;
  return than === undefined
    ? `${what} of ${name(option)}`
    : `the difference in ${what} between ${name(option)} and ${name(than)}`;
}

/** Unit of what is measured, for axes and files. */
export const measureUnit = ({ kind }: StudyMeasure): string =>
  kind === 'recovery' ? 'years' : kind === 'covered' ? 'm²' : 'share';
