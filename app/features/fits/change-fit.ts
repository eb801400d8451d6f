import type { z } from 'zod';
import {
  acceptFit,
  deleteFit,
  getFit,
  putFitState,
  resumeFit,
  startFit,
  stopFit,
  type Fit,
  type FitState,
} from '#contract/fits.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

type Address = Pick<Fit, 'siteId' | 'id'>;
const paramsOf = ({ siteId, id }: Address) => ({ siteId, fitId: id });

export type StartFitBody = z.input<typeof startFit.body>;

export const registerFit = (siteId: string, body: StartFitBody): Promise<Fit> =>
  callEndpoint(startFit, { params: { siteId }, body });
export const reopenFit = (fit: Address): Promise<Fit> => callEndpoint(resumeFit, { params: paramsOf(fit) });
export const takeOverFit = (fit: Address): Promise<Fit> => callEndpoint(acceptFit, { params: paramsOf(fit) });
export const removeFit = (fit: Address): Promise<unknown> =>
  callEndpoint(deleteFit, { params: paramsOf(fit) });

/** What a fit that is being worked on tells the server, and asks of it. */
export interface FitServer {
  /** as it stands now: what a page has read of it may be older */
  fit(address: Address, signal: AbortSignal): Promise<Fit>;
  putState(address: Address, state: FitState, signal: AbortSignal): Promise<void>;
  stop(address: Address): Promise<Fit>;
}

export const fitServer: FitServer = {
  fit: (address, signal) => callEndpoint(getFit, { params: paramsOf(address), signal }),
  putState: async (address, state, signal) => {
    await callEndpoint(putFitState, { params: paramsOf(address), body: state, signal });
  },
  stop: (address) => callEndpoint(stopFit, { params: paramsOf(address) }),
};
