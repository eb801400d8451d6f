import { z } from 'zod';
import { endpoint, id, instant } from './endpoint.ts';

/** Currencies of ISO 4217 by code, as this browser or server knows them. */
export const currencyCodes: readonly string[] = Intl.supportedValuesOf('currency');

const money = z
  .number('An amount of 0 or more')
  .min(0, 'An amount of 0 or more')
  .max(1e12, 'At most 1 000 000 000 000');

/** What works cost on a site, in one currency, at the prices of the survey year. */
export const costsSchema = z.strictObject({
  /** ISO 4217 */
  currency: z.string().regex(/^[A-Z]{3}$/, 'Expected a code of ISO 4217, such as EUR'),
  /** each */
  perMound: money,
  /** each clump that is planted */
  perClump: money,
  /** each metre of the outline of a fence */
  perFenceMetre: money,
  /** each visit of a crew */
  perVisit: money,
  /** each year with works, whatever they are */
  perYear: money,
  /** null while there is none */
  budget: money.nullable(),
  /** a year, as a share: 0.03 is 3 % */
  discountRate: z.number('A rate from 0 to 1').min(0, 'A rate from 0 to 1').max(1, 'A rate from 0 to 1'),
});
export type Costs = z.infer<typeof costsSchema>;

export const siteCostsSchema = z.object({
  costs: costsSchema,
  /** null while nobody has set them: the page then shows no amounts */
  changedAt: instant.nullable(),
  changedBy: z.string().nullable(),
});
export type SiteCosts = z.infer<typeof siteCostsSchema>;

const params = z.object({ siteId: id });
export const getCosts = endpoint({
  method: 'GET',
  path: '/api/sites/:siteId/costs',
  summary: 'What works cost on a site, and the budget',
  params,
  reply: siteCostsSchema,
});
export const setCosts = endpoint({
  method: 'PUT',
  path: '/api/sites/:siteId/costs',
  summary: 'Set what works cost on a site, and the budget',
  params,
  body: costsSchema,
  reply: siteCostsSchema,
});
