import {
  copyComparison,
  decide,
  deleteComparison,
  renameComparison,
  resumeComparison,
  startComparison,
  type Comparison,
} from '#contract/comparisons.ts';
import type { z } from 'zod';
import { callEndpoint } from '#app/lib/api-client.ts';

type Address = Pick<Comparison, 'siteId' | 'id'>;
const paramsOf = ({ siteId, id }: Address) => ({ siteId, comparisonId: id });

export type StartBody = z.input<typeof startComparison.body>;

export const registerComparison = (siteId: string, body: StartBody): Promise<Comparison> =>
  callEndpoint(startComparison, { params: { siteId }, body });

export const reopenComparison = (address: Address, replicates: number): Promise<Comparison> =>
  callEndpoint(resumeComparison, { params: paramsOf(address), body: { replicates } });

export const goOnInCopy = (address: Address, name: string, replicates: number): Promise<Comparison> =>
  callEndpoint(copyComparison, { params: paramsOf(address), body: { name, replicates } });

export const recordDecision = (
  address: Address,
  decision: { optionId: string; reason: string; reservations: string },
): Promise<Comparison> => callEndpoint(decide, { params: paramsOf(address), body: decision });

export const nameComparison = (address: Address, name: string): Promise<Comparison> =>
  callEndpoint(renameComparison, { params: paramsOf(address), body: { name } });

export const discardComparison = async (address: Address): Promise<void> => {
  await callEndpoint(deleteComparison, { params: paramsOf(address) });
};
