import { useEffect, useReducer, useRef } from 'react';
import { playback, type PlaybackAction } from './playback.ts';

export interface PlaybackOptions {
  readonly year: number;
  readonly first: number;
  /** last year that can be shown */
  readonly last: number;
  readonly onYear: (year: number) => void;
  readonly yearsPerSecond?: number;
  /** start at once; not where the person asked for less motion */
  readonly autoPlay?: boolean;
}

export interface PlaybackControls {
  readonly playing: boolean;
  readonly toggle: () => void;
  readonly pause: () => void;
  /** Shows a year and stops playing. */
  readonly go: (year: number) => void;
}

const wantsLessMotion = () => window.matchMedia('(prefers-reduced-motion: reduce)').matches;

/** Plays the years of a run, four a second unless said, and stops at the last. The year itself stays with the caller. */
export function usePlayback(options: PlaybackOptions): PlaybackControls {
  const { year, first, last, onYear, yearsPerSecond = 4, autoPlay = false } = options;
  const [playing, setPlaying] = useReducer(
    (_: boolean, next: boolean) => next,
    autoPlay,
    (wanted) => wanted && last > first && !wantsLessMotion(),
  );
  const act = (action: PlaybackAction) => {
    const next = playback({ year, playing }, action, { first, last });
    setPlaying(next.playing);
    if (next.year !== year) onYear(next.year);
  };
  const latest = useRef(act);
  useEffect(() => {
    latest.current = act;
  });
  useEffect(() => {
    if (!playing) return;
    const timer = setInterval(() => {
      latest.current({ type: 'tick' });
    }, 1000 / yearsPerSecond);
    return () => {
      clearInterval(timer);
    };
  }, [playing, yearsPerSecond]);
  return {
    playing,
    toggle: () => {
      act({ type: 'toggle' });
    },
    pause: () => {
      act({ type: 'pause' });
    },
    go: (to) => {
      act({ type: 'go', year: to });
    },
  };
}
