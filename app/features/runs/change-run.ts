import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { deleteRun, renameRun, startRun, stopRun, type Run } from '#contract/runs.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { forgetRun, keepRun } from './get-run.ts';
import { runFrames } from './live-runs.ts';

/** Registers a run; whoever computes it sends its frames as they come. */
export const registerRunMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (body: { name: string; optionId: string; spec: RunSpec }) =>
      callEndpoint(startRun, { params: { siteId }, body }),
    onSuccess: (run) => keepRun(queryClient, run),
  });

export const renameRunMutation = (queryClient: QueryClient, runId: string) =>
  mutationOptions({
    mutationFn: (name: string) => callEndpoint(renameRun, { params: { runId }, body: { name } }),
    onSuccess: (run) => keepRun(queryClient, run),
  });

/** Cancels a run that nobody works on any more; the frames stored so far stay. */
export const stopRunMutation = (queryClient: QueryClient, runId: string) =>
  mutationOptions({
    mutationFn: () => callEndpoint(stopRun, { params: { runId } }),
    onSuccess: (run) => keepRun(queryClient, run),
  });

export const deleteRunMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (run: Pick<Run, 'id' | 'siteId'>) => callEndpoint(deleteRun, { params: { runId: run.id } }),
    onSuccess: (_, run) => {
      runFrames.drop(run.id);
      forgetRun(queryClient, run);
    },
  });
