import { useEffect, useState } from 'react';
import { yearsAround } from './frame-cache.ts';
import { runFrames } from './live-runs.ts';

interface Shown {
  readonly runId: string;
  readonly year: number;
  readonly frame: Uint8Array;
}

/**
 * The frame of a year. While it is on its way the one shown before stays, so that scrubbing never flashes; `year` says
 * which one that is. Frames around the playhead are fetched ahead.
 *
 * @param storedYears years that have a frame, ascending
 */
export function useFrame(runId: string, year: number, storedYears: readonly number[]) {
  const [shown, setShown] = useState<Shown>();
  const [failed, setFailed] = useState<{ year: number; error: unknown }>();
  const [attempt, setAttempt] = useState(0);
  const stored = storedYears.includes(year);
  const cached = runFrames.peek(runId, year);

  useEffect(() => {
    if (!stored && !cached) return;
    let current = true;
    runFrames.load(runId, year).then(
      (frame) => {
        if (!current) return;
        setShown({ runId, year, frame });
        setFailed(undefined);
        runFrames.prefetch(runId, yearsAround(storedYears, year, runFrames.capacity(frame.length)));
      },
      (error: unknown) => {
        if (current) setFailed({ year, error });
      },
    );
    return () => {
      current = false;
    };
    // `cached` is what load would return at once.
  }, [runId, year, stored, cached, storedYears, attempt]);

  const now: Shown | undefined = cached
    ? { runId, year, frame: cached }
    : shown?.runId === runId
      ? shown
      : undefined;
  return {
    frame: now?.frame,
    year: now?.year,
    error: failed?.year === year && !cached ? failed.error : undefined,
    again: () => {
      setAttempt((n) => n + 1);
    },
  };
}
