import { useEffect, useRef, useState } from 'react';
import type { PlanProgress } from '#app/workers/plan-progress.ts';
import type { PlanHandle } from '#app/workers/suggest-client.ts';

export interface PlanJob<Result> {
  readonly running: boolean;
  readonly progress: PlanProgress | undefined;
  readonly result: Result | undefined;
  readonly error: unknown;
  /** Begins anew; what is under way is cancelled, and what an earlier one came to goes. */
  readonly start: (run: (onProgress: (progress: PlanProgress) => void) => PlanHandle<Result>) => void;
  /** Ends what is under way at once, and leaves nothing of it. */
  readonly cancel: () => void;
}

interface JobState<Result> {
  readonly running: boolean;
  readonly progress?: PlanProgress;
  readonly result?: Result | undefined;
  readonly error?: unknown;
}

/**
 * Work in a worker that takes a while: how far it is, what it came to, and the way to cancel it.
 *
 * @param known what an earlier one came to
 */
export function usePlanJob<Result>(known?: Result): PlanJob<Result> {
  const [state, setState] = useState<JobState<Result>>({ running: false, result: known });
  const handle = useRef<PlanHandle<Result>>(undefined);
  useEffect(
    () => () => {
      handle.current?.cancel();
      handle.current = undefined;
    },
    [],
  );
  /** Whatever the worker still says is heard by nobody: an answer on its way must not come after a cancel. */
  const end = () => {
    const ended = handle.current;
    handle.current = undefined;
    ended?.cancel();
  };
  return {
    running: state.running,
    progress: state.progress,
    result: state.result,
    error: state.error,
    start(run) {
      end();
      const mine = run((progress) => {
        if (handle.current === mine) setState((now) => ({ ...now, progress }));
      });
      handle.current = mine;
      setState({ running: true });
      mine.result.then(
        (result) => {
          if (handle.current === mine) setState({ running: false, result });
        },
        (error: unknown) => {
          if (handle.current === mine) setState({ running: false, error });
        },
      );
    },
    cancel() {
      end();
      setState({ running: false });
    },
  };
}
