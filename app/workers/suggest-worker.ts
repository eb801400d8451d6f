import { expose, transfer, type ProxyMarked, type Remote } from 'comlink';
import { gainMap } from '#sim-core/plan/gain-map.ts';
import { suggest } from '#sim-core/plan/suggest.ts';
import { groundOf } from './run-ground.ts';
import { followProgress, type PlanProgress, type PlanRequest } from './plan-progress.ts';

/** The caller's listener as it is seen from here. */
export interface ProgressListener {
  onProgress(progress: PlanProgress): void;
}

async function inputOf({ start, works, foothold, candidates }: PlanRequest) {
  const { spec, grid, allowed } = start;
  const { rates, stepsPerYear, surveyYear, years } = spec;
  const ground = await groundOf(start);
  return { grid, ground, rates, stepsPerYear, surveyYear, years, works, foothold, allowed, candidates };
}
const teller = (listener: Remote<ProgressListener & ProxyMarked>) => (progress: PlanProgress) =>
  void listener.onProgress(progress);

/** What the client calls; whoever cancels ends the worker. */
const face = {
  suggest: async (
    request: PlanRequest & { readonly amount: Parameters<typeof suggest>[0]['amount'] },
    listener: Remote<ProgressListener & ProxyMarked>,
  ) =>
    followProgress(suggest({ ...(await inputOf(request)), amount: request.amount }), teller(listener), () =>
      performance.now(),
    ),
  gainMap: async (request: PlanRequest, listener: Remote<ProgressListener & ProxyMarked>) => {
    const map = followProgress(gainMap(await inputOf(request)), teller(listener), () => performance.now());
    return transfer(map, [map.gains.buffer as ArrayBuffer]);
  },
};
export type SuggestFace = typeof face;

expose(face);
