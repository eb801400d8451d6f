import type { z } from 'zod';
import {
  copyBrief,
  deleteBrief,
  makeBrief,
  saveBrief,
  sendBrief,
  type Brief,
  type BriefMessage,
} from '#contract/briefs.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

type Address = Pick<Brief, 'siteId' | 'id'>;
const paramsOf = ({ siteId, id }: Address) => ({ siteId, briefId: id });

export const beginBrief = (siteId: string, comparisonId: string): Promise<Brief> =>
  callEndpoint(makeBrief, { params: { siteId }, body: { comparisonId } });

export const saveVersion = (address: Address, body: z.input<typeof saveBrief.body>): Promise<Brief> =>
  callEndpoint(saveBrief, { params: paramsOf(address), body });

export const duplicateBrief = (address: Address): Promise<Brief> =>
  callEndpoint(copyBrief, { params: paramsOf(address) });

export const removeBrief = (address: Address): Promise<void> =>
  callEndpoint(deleteBrief, { params: paramsOf(address) }) as Promise<void>;

export const postBrief = (address: Address, body: z.input<typeof sendBrief.body>): Promise<BriefMessage> =>
  callEndpoint(sendBrief, { params: paramsOf(address), body });
