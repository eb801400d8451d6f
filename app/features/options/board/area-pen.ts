import type { Action } from '#sim-core/spec/run-spec.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import type { AreaTool } from './board-tools.ts';

/** What an outline becomes, as it is typed in the sentence above the map. */
export interface AreaPen {
  /** per cent of cover that is planted */
  readonly cover: string;
  /** per cent of grazing that a fence keeps out */
  readonly strength: string;
  /** last year of a fence; empty: to the end */
  readonly until: string;
  /** per cent of the cover that is lost */
  readonly share: string;
}
export type AreaField = keyof AreaPen;
export type AreaErrors = Partial<Record<AreaField | 'year', string>>;

export const startingArea: AreaPen = { cover: '50', strength: '100', until: '', share: '50' };

export interface Span {
  readonly surveyYear: number;
  readonly years: number;
}

/** What is wrong with a year of works as it is typed, or the year. */
export function readYear(text: string, { surveyYear, years }: Span): number | string {
  const year = parseNumber(text);
  return year !== undefined && Number.isInteger(year) && year > surveyYear && year <= surveyYear + years
    ? year
    : `The year must be one from ${surveyYear + 1} to ${surveyYear + years}, the years of the outlook.`;
}

type AreaWork = Extract<Action, { area: unknown }>;
type WithoutArea<Of> = Of extends AreaWork ? Omit<Of, 'area'> : never;

/** The works that a sentence describes but for their outline, or what is wrong with each blank. */
export function readArea(
  tool: AreaTool,
  pen: AreaPen,
  yearText: string,
  span: Span,
): { work: WithoutArea<AreaWork>; errors?: undefined } | { work?: undefined; errors: AreaErrors } {
  const errors: AreaErrors = {};
  const percent = (field: AreaField, message: string): number => {
    const value = parseNumber(pen[field]);
    if (value !== undefined && value > 0 && value <= 100) return value / 100;
    errors[field] = message;
    return 0;
  };
  const read = readYear(yearText, span);
  if (typeof read === 'string') errors.year = read;
  const year = typeof read === 'number' ? read : 0;
  const work = ((): WithoutArea<AreaWork> => {
    switch (tool) {
      case 'even':
        return {
          kind: 'planting',
          year,
          cover: percent('cover', 'The cover must lie above 0 and up to 100 %.'),
        };
      case 'fence': {
        const strength = percent('strength', 'A fence keeps out above 0 and up to 100 %.');
        if (pen.until.trim() === '') return { kind: 'fence', year, strength };
        const until = readYear(pen.until, span);
        if (typeof until === 'string') errors.until = until;
        else if (until < year) errors.until = 'A fence cannot end before it starts.';
        return { kind: 'fence', year, strength, until: typeof until === 'number' ? until : year };
      }
      case 'loss':
        return {
          kind: 'loss',
          year,
          share: percent('share', 'The share lost must lie above 0 and up to 100 %.'),
        };
    }
  })();
  return Object.keys(errors).length > 0 ? { errors } : { work };
}
