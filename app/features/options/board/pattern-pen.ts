import type { Amount, Pattern, PointNumber, Spacing } from '#sim-core/plan/pattern.ts';
import type { GroundPoint } from '#app/map/rings.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import type { PatternTool } from './board-tools.ts';

/** What the number of a pattern means. */
export type AmountBy = 'count' | 'density' | 'budget' | 'spacing' | 'fit';

/** How a pattern is laid, as it is typed in the sentence above the map. */
export interface PatternPen {
  readonly by: AmountBy;
  readonly count: string;
  readonly perHectare: string;
  readonly budget: string;
  /** m between neighbours */
  readonly spacing: string;
  /** least distance between any two, m; 0: none */
  readonly apart: string;
  /** degrees from east towards north */
  readonly angle: string;
  readonly each: string;
  /** m around the middle of a group */
  readonly reach: string;
  readonly groupsApart: string;
  /** m outside what stands */
  readonly offset: string;
  readonly ground: 'bare' | 'any';
  readonly region: 'site' | 'outline';
}
export type PatternField = Exclude<keyof PatternPen, 'by' | 'ground' | 'region'>;
export type PatternErrors = Partial<Record<PatternField, string>>;

const usual: PatternPen = {
  by: 'count',
  count: '40',
  perHectare: '20',
  budget: '20000',
  spacing: '20',
  apart: '12',
  angle: '0',
  each: '5',
  reach: '6',
  groupsApart: '30',
  offset: '3',
  ground: 'bare',
  region: 'site',
};
const clumps = { ...usual, region: 'outline', count: '200', perHectare: '2500' } as const;

export type PatternPens = Readonly<Record<PatternTool, PatternPen>>;
export const startingPatterns: PatternPens = {
  scattered: usual,
  grid: { ...usual, by: 'spacing' },
  groups: usual,
  edge: { ...usual, by: 'spacing' },
  line: { ...usual, by: 'spacing', region: 'outline' },
  clumped: { ...clumps, each: '9', reach: '1', groupsApart: '4' },
  dispersed: { ...clumps, by: 'fit', apart: '1.5' },
};

/** What the number can mean for each pattern, the usual first. */
export const amountChoices: Readonly<Record<PatternTool, readonly AmountBy[]>> = {
  scattered: ['count', 'density', 'budget', 'fit'],
  grid: ['spacing', 'count', 'density', 'budget'],
  groups: ['count', 'density', 'budget'],
  edge: ['spacing', 'count', 'budget'],
  line: ['spacing', 'count', 'budget'],
  clumped: ['count', 'density', 'budget'],
  dispersed: ['fit', 'count', 'density', 'budget'],
};

/** Most points that a pattern is asked for, as an option can hold no more works. */
export const mostPoints = 20_000;

interface Limit {
  readonly fits: (value: number) => boolean;
  readonly message: string;
}
const metres = (name: string, least = 0): Limit => ({
  fits: (m) => (least > 0 ? m >= least : m >= 0) && m <= 10_000,
  message: `${name} must lie between ${least} and 10,000 m.`,
});
const whole = (name: string, least: number, most: number): Limit => ({
  fits: (n) => Number.isInteger(n) && n >= least && n <= most,
  message: `${name} must be a whole number from ${least} to ${most.toLocaleString('en-GB')}.`,
});
const limits: Record<PatternField, Limit> = {
  count: whole('The number', 1, mostPoints),
  perHectare: {
    fits: (n) => n > 0 && n <= 1e6,
    message: 'The number a hectare must lie above 0 and up to 1,000,000.',
  },
  budget: { fits: (n) => n > 0 && n <= 1e12, message: 'The budget must lie above 0.' },
  spacing: metres('The spacing', 0.1),
  apart: metres('The distance'),
  angle: { fits: (a) => a >= -360 && a <= 360, message: 'The turn must lie between −360 and 360°.' },
  each: whole('The size of a group', 1, 1000),
  reach: metres('The reach of a group', 0.1),
  groupsApart: metres('The distance of the groups'),
  offset: metres('The distance from the edge'),
};

/** What is needed beside the pen to say what a pattern is. */
export interface PatternSetting {
  /** cost of one mound or clump; undefined where no costs are set, and no budget can be divided */
  readonly unitCost: number | undefined;
  /** of a line */
  readonly line: readonly GroundPoint[];
}

/** The pattern that a sentence describes, or what is wrong with each blank. */
export function readPattern(
  tool: PatternTool,
  pen: PatternPen,
  { unitCost, line }: PatternSetting,
): { pattern: Pattern; errors?: undefined } | { pattern?: undefined; errors: PatternErrors } {
  const errors: PatternErrors = {};
  const read = (field: PatternField): number => {
    const value = parseNumber(pen[field]);
    if (value !== undefined && limits[field].fits(value)) return value;
    errors[field] = limits[field].message;
    return 0;
  };
  /** Of points: so many, or what a budget buys. */
  const number = (): PointNumber => {
    if (pen.by !== 'budget') return { by: 'count', count: read('count') };
    const budget = read('budget');
    if (!unitCost) errors.budget = 'No cost is set for one of them, so a budget says nothing.';
    return { by: 'budget', budget, each: unitCost ?? 1 };
  };
  const amount = (): Amount =>
    pen.by === 'density' ? { by: 'density', perHectare: read('perHectare') } : number();
  const spacingOr = <Other>(other: () => Other): Other | Spacing =>
    pen.by === 'spacing' ? { by: 'spacing', spacing: read('spacing') } : other();
  const pattern = ((): Pattern => {
    switch (tool) {
      case 'scattered': {
        const distance = read('apart');
        if (pen.by === 'fit' && distance === 0) errors.apart ??= 'As many as fit needs a distance above 0.';
        if (pen.by === 'fit') return { kind: 'apart', distance };
        return distance > 0
          ? { kind: 'apart', distance, amount: amount() }
          : { kind: 'scattered', amount: amount() };
      }
      case 'dispersed': {
        const distance = read('apart');
        if (distance === 0) errors.apart ??= 'Dispersed clumps need a distance above 0.';
        return pen.by === 'fit' ? { kind: 'apart', distance } : { kind: 'apart', distance, amount: amount() };
      }
      case 'grid':
        return { kind: 'grid', angle: read('angle'), amount: spacingOr(amount) };
      case 'groups':
      case 'clumped':
        return {
          kind: 'groups',
          each: read('each'),
          reach: read('reach'),
          distance: read('groupsApart'),
          amount: amount(),
        };
      case 'edge':
        return { kind: 'edge', offset: read('offset'), amount: spacingOr(number) };
      case 'line':
        return { kind: 'line', line, amount: spacingOr(number) };
    }
  })();
  return Object.keys(errors).length > 0 ? { errors } : { pattern };
}

/** A pen's fields as a set of works keeps them, so that it can be laid anew. */
export const penParameters = (tool: PatternTool, pen: PatternPen): Record<string, string> => ({
  tool,
  ...pen,
});

/** The tool and the pen that laid a set, where they can be read back. */
export function penOf(
  parameters: Readonly<Record<string, unknown>>,
): { tool: PatternTool; pen: PatternPen } | undefined {
  const { tool } = parameters;
  if (typeof tool !== 'string' || !Object.hasOwn(startingPatterns, tool)) return undefined;
  const start = startingPatterns[tool as PatternTool];
  const kept = Object.fromEntries(
    Object.keys(start).map((field) => {
      const value = parameters[field];
      return [field, typeof value === 'string' ? value : start[field as keyof PatternPen]];
    }),
  );
  return { tool: tool as PatternTool, pen: { ...start, ...kept } };
}
