/** Playing through years: pure, so that the hook only adds the clock. */
export interface Playback {
  readonly year: number;
  readonly playing: boolean;
}
export interface PlaybackRange {
  readonly first: number;
  /** last year that can be shown */
  readonly last: number;
}
export type PlaybackAction = { type: 'toggle' | 'pause' | 'tick' } | { type: 'go'; year: number };

/** Next state: play starts over from the end, a tick at the end stops, moving by hand stops too. */
export function playback(state: Playback, action: PlaybackAction, { first, last }: PlaybackRange): Playback {
  const inside = (year: number) => Math.min(last, Math.max(first, year));
  switch (action.type) {
    case 'toggle':
      if (state.playing) return { ...state, playing: false };
      return last > first ? { year: state.year >= last ? first : state.year, playing: true } : state;
    case 'pause':
      return { ...state, playing: false };
    case 'go':
      return { year: inside(action.year), playing: false };
    case 'tick': {
      if (!state.playing) return state;
      const year = inside(state.year + 1);
      return { year, playing: year < last };
    }
  }
}

/** Year that a key leads to, or undefined where the key means nothing here. */
export function yearForKey(key: string, year: number, { first, last }: PlaybackRange): number | undefined {
  const moves: Record<string, number> = {
    ArrowLeft: year - 1,
    ArrowDown: year - 1,
    ArrowRight: year + 1,
    ArrowUp: year + 1,
    PageDown: year - 5,
    PageUp: year + 5,
    Home: first,
    End: last,
  };
  return Object.hasOwn(moves, key) ? Math.min(last, Math.max(first, moves[key])) : undefined;
}
