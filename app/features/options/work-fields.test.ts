// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { Work } from '#contract/works.ts';
import { fieldText, withField, type WorkField } from './work-fields.ts';

const span = { surveyYear: 2026, years: 34 };
const area = { shape: 'disc', x: 5, y: 5, radius: 2 } as const;
const mound: Work = { kind: 'mound', id: 'm', year: 2028, x: 1, y: 2, radius: 1.5, strength: 0.25, halo: 1 };
const fence: Work = { kind: 'fence', id: 'f', year: 2028, until: 2031, strength: 1, area };
const planting: Work = { kind: 'planting', id: 'p', year: 2028, cover: 0.5, area };
const clumps: Work = { kind: 'clumps', id: 'c', year: 2028, points: [[1, 2]], each: 3 };
const loss: Work = { kind: 'loss', id: 'l', year: 2028, share: 0.125, area };

describe('a field of the works', () => {
  it('reads as it would be typed, and is written back the same', () => {
    for (const [work, field, text] of [
      [mound, 'strength', '25'],
      [mound, 'x', '1'],
      [fence, 'until', '2031'],
      [planting, 'cover', '50'],
      [clumps, 'each', '3'],
      [loss, 'share', '12.5'],
      [loss, 'name', ''],
    ] as [Work, WorkField, string][]) {
      expect(fieldText(work, field)).toBe(text);
      expect(withField(work, field, text, span)).toEqual(work);
    }
    expect(fieldText(mound, 'cover')).toBeUndefined();
  });
  it('takes what fits', () => {
    expect(withField(mound, 'radius', '2', span)).toMatchObject({ radius: 2 });
    expect(withField(fence, 'until', '', span)).toMatchObject({ until: undefined });
    expect(withField(fence, 'strength', '80', span)).toMatchObject({ strength: 0.8 });
    expect(withField(mound, 'name', ' North bank ', span)).toMatchObject({ name: 'North bank' });
  });
  it('says what is wrong, in words', () => {
    for (const [work, field, text, words] of [
      [mound, 'year', '2026', 'from 2027 to 2060'],
      [fence, 'year', '2032', 'ends in 2031'],
      [fence, 'until', '2027', 'starts in 2028'],
      [mound, 'radius', '0', 'above 0'],
      [planting, 'cover', '101', 'up to 100 %'],
      [clumps, 'each', '1.5', 'whole number'],
      [mound, 'x', 'east', 'no number'],
    ] as [Work, WorkField, string, string][])
      expect(withField(work, field, text, span)).toContain(words);
  });
});
