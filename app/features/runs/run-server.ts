import type { RunResult } from '#sim-core/spec/run-result.ts';
import { checkRun, finishRun, putClosing, putFrame, stopRun, type Run } from '#contract/runs.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

/** What a run that is being worked on tells the server. */
export interface RunServer {
  putFrame(runId: string, year: number, packed: Blob, signal: AbortSignal): Promise<void>;
  putClosing(runId: string, packed: Blob, signal: AbortSignal): Promise<void>;
  finish(runId: string, result: RunResult): Promise<Run>;
  stop(runId: string): Promise<Run>;
  check(runId: string, check: { digest: string; engineVersion: string }): Promise<Run>;
}

export const runServer: RunServer = {
  putFrame: async (runId, year, packed, signal) => {
    await callEndpoint(putFrame, { params: { runId, year }, bytes: packed, signal });
  },
  putClosing: async (runId, packed, signal) => {
    await callEndpoint(putClosing, { params: { runId }, bytes: packed, signal });
  },
  finish: (runId, result) => callEndpoint(finishRun, { params: { runId }, body: result }),
  stop: (runId) => callEndpoint(stopRun, { params: { runId } }),
  check: (runId, check) => callEndpoint(checkRun, { params: { runId }, body: check }),
};
