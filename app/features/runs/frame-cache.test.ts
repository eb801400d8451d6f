// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import { createFrameCache, yearsAround } from './frame-cache.ts';

const frame = (year: number, cells = 10) => new Uint8Array(cells).fill(year % 256);
const tick = () => new Promise((resolve) => setTimeout(resolve));

describe('createFrameCache', () => {
  it('fetches each frame once, also when asked twice at the same time', async () => {
    const fetchFrame = vi.fn((_: string, year: number) => Promise.resolve(frame(year)));
    const cache = createFrameCache(fetchFrame, 1000);
    const [a, b] = await Promise.all([cache.load('r', 2030), cache.load('r', 2030)]);
    expect(a).toBe(b);
    expect(await cache.load('r', 2030)).toBe(a);
    expect(cache.peek('r', 2030)).toBe(a);
    expect(cache.peek('other', 2030)).toBeUndefined();
    expect(fetchFrame).toHaveBeenCalledTimes(1);
  });

  it('drops what was shown longest ago once the budget is spent', () => {
    const cache = createFrameCache(() => Promise.reject(new Error('not asked for')), 60);
    for (let year = 1; year <= 6; year++) cache.put('r', year, frame(year));
    cache.peek('r', 1);
    cache.put('r', 7, frame(7));
    expect(cache.peek('r', 1)).toBeDefined();
    expect(cache.peek('r', 2)).toBeUndefined();
    expect(cache.peek('r', 7)).toBeDefined();
  });

  it('keeps a handful of frames even when each alone breaks the budget', () => {
    const cache = createFrameCache(() => Promise.reject(new Error('not asked for')), 5);
    for (let year = 1; year <= 9; year++) cache.put('r', year, frame(year));
    expect([1, 2, 3, 4, 5, 6, 7, 8, 9].filter((y) => cache.peek('r', y))).toEqual([6, 7, 8, 9]);
    expect(cache.capacity(10)).toBe(4);
    expect(createFrameCache(() => Promise.reject(new Error()), 1000).capacity(10)).toBe(100);
  });

  it('tries again after a failure', async () => {
    const fetchFrame = vi
      .fn<(r: string, y: number) => Promise<Uint8Array>>()
      .mockRejectedValueOnce(new Error('gone for a moment'))
      .mockResolvedValue(frame(1));
    const cache = createFrameCache(fetchFrame, 1000);
    await expect(cache.load('r', 1)).rejects.toThrow('gone for a moment');
    await expect(cache.load('r', 1)).resolves.toEqual(frame(1));
  });

  it('fetches ahead one at a time, and leaves off when the playhead has moved on', async () => {
    const asked: number[] = [];
    const waiting: (() => void)[] = [];
    const cache = createFrameCache((_, year) => {
      asked.push(year);
      return new Promise((resolve) => waiting.push(() => resolve(frame(year))));
    }, 1000);
    cache.prefetch('r', [1, 2, 3]);
    await tick();
    expect(asked).toEqual([1]);
    cache.prefetch('r', [8]);
    await tick();
    expect(asked).toEqual([1, 8]);
    waiting.forEach((go) => go());
    await tick();
    expect(asked).toEqual([1, 8]);
    expect(cache.peek('r', 1)).toBeDefined();
  });

  it('reads one cell through the years at hand', () => {
    const cache = createFrameCache(() => Promise.reject(new Error('not asked for')), 1000);
    cache.put('r', 2028, Uint8Array.of(1, 2));
    cache.put('r', 2026, Uint8Array.of(3, 4));
    cache.put('s', 2027, Uint8Array.of(5, 6));
    expect(cache.history('r', 2026, 2030, 1)).toEqual([
      { year: 2026, byte: 4 },
      { year: 2028, byte: 2 },
    ]);
  });

  it('tells when a frame has come in', async () => {
    const cache = createFrameCache(() => Promise.resolve(frame(1)), 1000);
    const heard = vi.fn();
    const end = cache.subscribe(heard);
    const before = cache.version();
    await cache.load('r', 2026);
    cache.put('r', 2027, frame(2));
    expect(heard).toHaveBeenCalledTimes(2);
    expect(cache.version()).toBe(before + 2);
    end();
    cache.put('r', 2028, frame(3));
    expect(heard).toHaveBeenCalledTimes(2);
  });

  it('forgets a run that was deleted', () => {
    const cache = createFrameCache(() => Promise.reject(new Error('not asked for')), 1000);
    cache.put('r', 1, frame(1));
    cache.put('s', 1, frame(1));
    cache.drop('r');
    expect([cache.peek('r', 1), cache.peek('s', 1)]).toEqual([undefined, frame(1)]);
  });
});

describe('yearsAround', () => {
  const stored = Array.from({ length: 35 }, (_, i) => 2026 + i);
  it('looks forward first, then back', () => {
    expect(yearsAround(stored, 2040, 34)).toEqual([
      ...Array.from({ length: 12 }, (_, i) => 2041 + i),
      2039,
      2038,
      2037,
      2036,
      2035,
      2034,
    ]);
  });
  it('asks for all of a run that the cache holds, so that a cell can be read through all its years', () => {
    const all = yearsAround(stored, 2040, 35);
    expect([...all, 2040].sort()).toEqual(stored);
    expect(all.slice(0, 2)).toEqual([2041, 2042]);
  });
  it('asks for no more than what the cache can hold beside the year shown', () => {
    expect(yearsAround(stored, 2040, 4)).toEqual([2041, 2042]);
    expect(yearsAround(stored, 2060, 4)).toEqual([]);
    expect(yearsAround([], 2040, 100)).toEqual([]);
  });
});
