import { describe, expect, it } from 'vitest';
import {
  formatArea,
  formatBytes,
  formatCounted,
  formatDate,
  formatDuration,
  formatLength,
  formatNumber,
  formatShare,
} from './formats.ts';

describe('formats', () => {
  it.each([
    [0, '0 m²'],
    [9_999, '9,999 m²'],
    [10_000, '1 ha'],
    [118_300, '11.8 ha'],
    [12_345_678, '1,235 ha'],
  ])('area of %d m²', (area, words) => expect(formatArea(area)).toBe(words));

  it.each([
    [0.5, '0.5 m'],
    [12.34, '12.3 m'],
    [9_876, '9,876 m'],
    [12_500, '12.5 km'],
  ])('length of %d m', (length, words) => expect(formatLength(length)).toBe(words));

  it.each([
    [0, '0 %'],
    [0.001, 'under 1 %'],
    [0.37, '37 %'],
    [0.999, 'over 99 %'],
    [1, '100 %'],
  ])('share %d never rounds to none or all', (share, words) => expect(formatShare(share)).toBe(words));

  it.each([
    [1, '1 run'],
    [0, '0 runs'],
    [1_200, '1,200 runs'],
  ])('%d counted', (n, words) => expect(formatCounted(n, 'run')).toBe(words));

  it.each([
    [1, '1 byte'],
    [999, '999 bytes'],
    [1_440_000, '1.4 MB'],
    [5e12, '5,000 GB'],
  ])('%d bytes', (n, words) => expect(formatBytes(n)).toBe(words));

  it.each([
    [2, 'under 5 s'],
    [37, '40 s'],
    [98, '1 min 40 s'],
    [1_500, '25 min'],
    [7_500, '2 h 5 min'],
  ])('%d s left', (s, words) => expect(formatDuration(s)).toBe(words));

  it('writes a true minus', () => expect(formatNumber(-2.3)).toBe('−2.3'));
  it('writes dates with the month in words', () =>
    expect(formatDate('2026-12-01T12:00:00Z')).toBe('1 Dec 2026'));
});
