import { z } from 'zod';
import { unitCostsSchema } from '#sim-core/spec/unit-costs.ts';
import { endpoint, id, instant } from './endpoint.ts';

/** Currencies of ISO 4217 by code, as this browser or server knows them. */
export const currencyCodes: readonly string[] = Intl.supportedValuesOf('currency');

export const siteCostsSchema = z.object({
  costs: unitCostsSchema,
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
  body: unitCostsSchema,
  reply: siteCostsSchema,
});
