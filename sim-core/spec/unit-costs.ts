import { z } from 'zod';

const money = z.number().min(0).max(1e12);

/** What works cost, in one currency, as the team enters it. Nothing is set before: prices are local. */
export const unitCostsSchema = z.strictObject({
  /** ISO 4217 */
  currency: z.string().regex(/^[A-Z]{3}$/, 'a currency code of three capital letters, such as USD or EUR'),
  /** built, each */
  mound: money.default(0),
  /** grown, carried out and set, each */
  clump: money.default(0),
  /** of the fence line, m */
  fenceMetre: money.default(0),
  /** one crew's way to the site and back */
  visit: money.default(0),
  /** visits in each year that has works */
  visitsPerYear: z.number().int().min(0).max(366).default(1),
  /** what an option with works costs every year to the horizon, such as watching over them; none without works */
  perYear: money.default(0),
  /** share a year by which a cost weighs less for each year it is put off */
  discountRate: z.number().min(0).max(1).default(0),
  /** what there is to spend in all; null: not set */
  budget: money.nullable().default(null),
});
export type UnitCosts = z.infer<typeof unitCostsSchema>;
