import { parseNumber } from '#app/lib/parse-number.ts';

/** How many footholds are suggested, as it is typed. */
export interface SuggestPen {
  readonly by: 'count' | 'budget';
  readonly count: string;
  readonly budget: string;
}
export const startingSuggest: SuggestPen = { by: 'count', count: '10', budget: '20000' };
const most = 1000;

export type SuggestAmount =
  | { readonly by: 'count'; readonly count: number }
  | { readonly by: 'budget'; readonly budget: number; readonly each: number };

/** The amount that is typed, or what is wrong with it. `each`: cost of one; undefined where no costs are set. */
export function readSuggest(pen: SuggestPen, each: number | undefined): SuggestAmount | string {
  const value = parseNumber(pen[pen.by]);
  if (pen.by === 'count')
    return value !== undefined && Number.isInteger(value) && value >= 1 && value <= most
      ? { by: 'count', count: value }
      : `The number must be a whole one from 1 to ${most.toLocaleString('en-GB')}.`;
  if (!each) return 'No cost is set for a mound, so a budget says nothing.';
  if (value === undefined || !(value > 0)) return 'The budget must lie above 0.';
  if (value < each) return 'The budget buys not a single one.';
  return value / each > most
    ? `The budget buys more than ${most.toLocaleString('en-GB')}, the most that are suggested at once.`
    : { by: 'budget', budget: value, each };
}
