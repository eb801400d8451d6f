import type { Action } from '#sim-core/spec/run-spec.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { areaExtent } from './extent.ts';

/** What makes up a sum, in the currency of the unit costs. */
export interface CostParts {
  readonly mounds: number;
  readonly clumps: number;
  readonly fences: number;
  readonly visits: number;
  /** what falls due every year */
  readonly fixed: number;
  readonly total: number;
}

export interface Costs extends CostParts {
  readonly currency: string;
  /** each year from the first after the survey to the horizon */
  readonly byYear: readonly (CostParts & { readonly year: number; readonly discounted: number })[];
  /** worth of all costs in the survey year, each divided by (1 + discount rate) once for every year it is put off */
  readonly presentValue: number;
  /** of the budget, null where none is set; below 0 where the works cost more */
  readonly left: number | null;
  /** how much of each is paid for */
  readonly amounts: Amounts;
}

export interface Amounts {
  readonly mounds: number;
  readonly clumps: number;
  /** m of fence line */
  readonly fenceMetres: number;
  readonly visits: number;
}

export interface CostInput {
  readonly works: readonly Action[];
  readonly unitCosts: UnitCosts;
  readonly surveyYear: number;
  /** years from the survey to the horizon, over which fixed costs are paid; they are not where there are no works */
  readonly years: number;
  /** ν: planted cover is paid for by the clumps that it is made of */
  readonly clumpsPerSquareMetre: number;
}

/** Mounds, clumps and metres of fence line of one of the works; losses cost nothing. */
export function amountsOf(action: Action, clumpsPerSquareMetre: number): Omit<Amounts, 'visits'> {
  const none = { mounds: 0, clumps: 0, fenceMetres: 0 };
  switch (action.kind) {
    case 'mound':
      return { ...none, mounds: 1 };
    case 'clumps':
      return { ...none, clumps: action.points.length * action.each };
    case 'planting':
      return {
        ...none,
        clumps: Math.round(areaExtent(action.area).area * action.cover * clumpsPerSquareMetre),
      };
    case 'fence':
      return { ...none, fenceMetres: areaExtent(action.area).outline };
    case 'loss':
      return none;
  }
}

/**
 * What the works cost: mounds, clumps and fence line by the piece in their year, visits in every year that has works, and
 * fixed costs every year to the horizon, as long as there are works at all. A fence is paid for once, when it is put up.
 * Works dated outside the years that are looked at are left out.
 */
export function costsOf(input: CostInput): Costs {
  const { works, unitCosts, surveyYear, years, clumpsPerSquareMetre } = input;
  const paid = works.filter((work) => work.kind !== 'loss');
  const ofYear = new Map<number, Action[]>();
  for (const work of paid) {
    const there = ofYear.get(work.year);
    if (there) there.push(work);
    else ofYear.set(work.year, [work]);
  }
  const amounts = { mounds: 0, clumps: 0, fenceMetres: 0, visits: 0 };
  const byYear = Array.from({ length: years }, (_, i) => {
    const year = surveyYear + 1 + i;
    const here = ofYear.get(year) ?? [];
    const parts = { mounds: 0, clumps: 0, fences: 0, visits: 0, fixed: 0, total: 0 };
    for (const work of here) {
      const { mounds, clumps, fenceMetres } = amountsOf(work, clumpsPerSquareMetre);
      amounts.mounds += mounds;
      amounts.clumps += clumps;
      amounts.fenceMetres += fenceMetres;
      parts.mounds += mounds * unitCosts.mound;
      parts.clumps += clumps * unitCosts.clump;
      parts.fences += fenceMetres * unitCosts.fenceMetre;
    }
    const visits = here.length > 0 ? unitCosts.visitsPerYear : 0;
    amounts.visits += visits;
    parts.visits = visits * unitCosts.visit;
    parts.fixed = paid.length > 0 ? unitCosts.perYear : 0;
    parts.total = parts.mounds + parts.clumps + parts.fences + parts.visits + parts.fixed;
    return { year, ...parts, discounted: parts.total / (1 + unitCosts.discountRate) ** (i + 1) };
  });
  const sum = (part: keyof CostParts | 'discounted') => byYear.reduce((all, year) => all + year[part], 0);
  const total = sum('total');
  return {
    currency: unitCosts.currency,
    mounds: sum('mounds'),
    clumps: sum('clumps'),
    fences: sum('fences'),
    visits: sum('visits'),
    fixed: sum('fixed'),
    total,
    byYear,
    presentValue: sum('discounted'),
    left: unitCosts.budget === null ? null : unitCosts.budget - total,
    amounts,
  };
}

/**
 * Cost of each hectare that recovers by the horizon and would not have under Wait, undefined where there is none.
 *
 * @param squareMetres,waitSquareMetres recovered with the works, and without
 */
export function costPerHectare(
  cost: number,
  squareMetres: number,
  waitSquareMetres: number,
): number | undefined {
  const hectares = (squareMetres - waitSquareMetres) / 10_000;
  return hectares > 0 ? cost / hectares : undefined;
}
