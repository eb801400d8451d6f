// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { playback, yearForKey } from './playback.ts';

const range = { first: 2026, last: 2030 };

describe('playback', () => {
  it('plays to the last year and stops there', () => {
    let state = playback({ year: 2028, playing: false }, { type: 'toggle' }, range);
    expect(state).toEqual({ year: 2028, playing: true });
    state = playback(state, { type: 'tick' }, range);
    expect(state).toEqual({ year: 2029, playing: true });
    state = playback(state, { type: 'tick' }, range);
    expect(state).toEqual({ year: 2030, playing: false });
    expect(playback(state, { type: 'tick' }, range)).toEqual(state);
  });
  it('starts over when it is played from the end', () => {
    expect(playback({ year: 2030, playing: false }, { type: 'toggle' }, range)).toEqual({
      year: 2026,
      playing: true,
    });
  });
  it('has nothing to play where there is one year', () => {
    const one = { first: 2026, last: 2026 };
    expect(playback({ year: 2026, playing: false }, { type: 'toggle' }, one).playing).toBe(false);
  });
  it('stops when somebody moves by hand, and stays inside', () => {
    expect(playback({ year: 2027, playing: true }, { type: 'go', year: 2100 }, range)).toEqual({
      year: 2030,
      playing: false,
    });
    expect(playback({ year: 2027, playing: true }, { type: 'pause' }, range).playing).toBe(false);
  });
});

describe('yearForKey', () => {
  it.each([
    ['ArrowRight', 2029],
    ['ArrowLeft', 2027],
    ['PageUp', 2030],
    ['PageDown', 2026],
    ['Home', 2026],
    ['End', 2030],
    ['a', undefined],
    ['toString', undefined],
  ])('%s leads from 2028 to %s', (key, year) => {
    expect(yearForKey(key, 2028, range)).toBe(year);
  });
});
