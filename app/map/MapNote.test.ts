import { describe, expect, it } from 'vitest';
import { layNote } from './MapNote.tsx';

const size = { width: 800, height: 500 };
const offset = { left: 40, top: 24 };
const at = (left: number, top: number, height: number, room = size) => {
  const { style } = layNote({ left, top }, room, offset, height);
  return style as { left?: number; right?: number; top: number };
};

describe('where a note stands', () => {
  it('is beside its place where there is room', () => {
    expect(at(100, 100, 60)).toEqual({ left: 140, top: 112 });
    expect(at(700, 100, 60)).toEqual({ right: 140, top: 112 });
  });
  it('is never cut off by the foot of the map, nor covered by what the map says there', () => {
    for (const top of [400, 480, 500]) expect(at(100, top, 90).top + 90).toBeLessThan(500 - 30);
  });
  it('goes below or above on a narrow map, and stays on it', () => {
    const phone = { width: 360, height: 300 };
    expect(at(200, 80, 90, phone).top).toBe(120);
    const above = at(200, 260, 90, phone);
    expect(above.top + 90).toBeLessThanOrEqual(260 - 40);
    expect(at(200, 140, 250, phone).top).toBe(18);
  });
});
