import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { parseNumber } from '#app/lib/parse-number.ts';

/** Costs as they are typed in the blanks of a sentence. */
export type CostsDraft = Record<keyof UnitCosts, string>;
export type CostsErrors = Partial<Record<keyof UnitCosts, string>>;

/** The draft of costs that are set; the discount rate in per cent, and no budget as an empty blank. */
export function draftOfCosts(costs: UnitCosts): CostsDraft {
  const { budget, discountRate, ...rest } = costs;
  const text = (value: number) => String(Number(value.toPrecision(12)));
  return {
    currency: rest.currency,
    mound: text(rest.mound),
    clump: text(rest.clump),
    fenceMetre: text(rest.fenceMetre),
    visit: text(rest.visit),
    visitsPerYear: text(rest.visitsPerYear),
    perYear: text(rest.perYear),
    discountRate: text(100 * discountRate),
    budget: budget === null ? '' : text(budget),
  };
}

const mostMoney = 1e12;
const amountNames = {
  mound: 'A mound',
  clump: 'A clump',
  fenceMetre: 'A metre of fence',
  visit: 'A visit',
  perYear: 'What falls due every year',
} as const;

/** The costs that the sentence says, or what is wrong with each blank. */
export function readCosts(
  draft: CostsDraft,
): { costs: UnitCosts; errors?: undefined } | { costs?: undefined; errors: CostsErrors } {
  const errors: CostsErrors = {};
  const read = (field: keyof UnitCosts, fits: (value: number) => boolean, message: string): number => {
    const value = parseNumber(draft[field]);
    if (value !== undefined && fits(value)) return value;
    errors[field] = message;
    return 0;
  };
  const isAmount = (value: number) => value >= 0 && value <= mostMoney;
  const amount = (field: keyof typeof amountNames) =>
    read(field, isAmount, `${amountNames[field]} costs an amount of 0 or more.`);
  const costs: UnitCosts = {
    currency: draft.currency,
    mound: amount('mound'),
    clump: amount('clump'),
    fenceMetre: amount('fenceMetre'),
    visit: amount('visit'),
    visitsPerYear: read(
      'visitsPerYear',
      (n) => Number.isInteger(n) && n >= 0 && n <= 366,
      'Visits a year are a whole number from 0 to 366.',
    ),
    perYear: amount('perYear'),
    discountRate:
      read('discountRate', (p) => p >= 0 && p <= 100, 'The discount rate lies between 0 and 100 % a year.') /
      100,
    budget:
      draft.budget.trim() === ''
        ? null
        : read(
            'budget',
            isAmount,
            'The budget is an amount of 0 or more; leave it empty where there is none.',
          ),
  };
  return Object.keys(errors).length > 0 ? { errors } : { costs };
}
