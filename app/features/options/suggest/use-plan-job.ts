import { useEffect, useRef, useState } from 'react';
import type { PlanProgress } from '#app/workers/plan-progress.ts';
import { PlanCancelled, type PlanHandle } from '#app/workers/suggest-client.ts';

export interface PlanJob<Result> {
  readonly running: boolean;
  readonly progress: PlanProgress | undefined;
  readonly result: Result | undefined;
  readonly error: unknown;
  /** Begins anew; what is under way is cancelled, an earlier result stays until there is another. */
  readonly start: (run: (onProgress: (progress: PlanProgress) => void) => PlanHandle<Result>) => void;
  readonly cancel: () => void;
  readonly forget: () => void;
}

interface JobState<Result> {
  readonly running: boolean;
  readonly progress?: PlanProgress;
  readonly result?: Result;
  readonly error?: unknown;
}

/** Work in a worker that takes a while: how far it is, what it came to, and the way to cancel it. */
export function usePlanJob<Result>(): PlanJob<Result> {
  const [state, setState] = useState<JobState<Result>>({ running: false });
  const handle = useRef<PlanHandle<Result>>(undefined);
  useEffect(() => () => handle.current?.cancel(), []);
  return {
    running: state.running,
    progress: state.progress,
    result: state.result,
    error: state.error,
    start(run) {
      handle.current?.cancel();
      const mine = run((progress) => {
        if (handle.current === mine) setState((now) => ({ ...now, progress }));
      });
      handle.current = mine;
      setState(({ result }) => ({ running: true, result }));
      mine.result.then(
        (result) => {
          if (handle.current === mine) setState({ running: false, result });
        },
        (error: unknown) => {
          if (handle.current !== mine) return;
          setState(({ result }) => ({
            running: false,
            result,
            ...(error instanceof PlanCancelled ? {} : { error }),
          }));
        },
      );
    },
    cancel: () => handle.current?.cancel(),
    forget: () => setState({ running: false }),
  };
}
