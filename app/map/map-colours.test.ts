// @vitest-environment node
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  paint,
  paletteOf,
  parseColour,
  rampColour,
  schemeOf,
  type MapColours,
  type Rgb,
} from './map-colours.ts';
import { closingCode, closingTexel, noClassCode } from './map-raster.ts';

const css = readFileSync(`${import.meta.dirname}/../theme.css`, 'utf8');
/** Tokens as the theme file has them; the dark block comes second. */
function ramp(name: string, dark: boolean): Rgb[] {
  return Array.from({ length: 9 }, (_, i) => {
    const found = [...css.matchAll(new RegExp(`--color-${name}-${i}:\\s*(#[0-9a-f]{6})`, 'g'))];
    return parseColour(found[dark ? 1 : 0][1]);
  });
}
const colours = (dark: boolean): MapColours => ({
  cover: ramp('cover', dark),
  closing: ramp('closing', dark),
  difference: ramp('diff', dark),
  water: [1, 2, 3],
  shore: [4, 5, 6],
  standing: [7, 8, 9],
  late: [10, 11, 12],
  flag: '#ff5a36',
  ink: '#13262d',
  halo: '#eef1f1',
});
const entry = (palette: Uint8Array, code: number) => [...palette.subarray(code * 4, code * 4 + 4)];
/** Relative luminance, WCAG 2.2. */
const luminance = (rgb: readonly number[]) => {
  const [r, g, b] = rgb.map((v) =>
    v / 255 <= 0.04045 ? v / 255 / 12.92 : ((v / 255 + 0.055) / 1.055) ** 2.4,
  );
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
};
const closing = (lastYear: number) =>
  schemeOf({ kind: 'closing', values: new Int16Array(1), surveyYear: 2026, lastYear });

describe('parseColour', () => {
  it('reads hexadecimal colours, and names what it cannot read', () => {
    expect(parseColour(' #5b825a ')).toEqual([91, 130, 90]);
    expect(parseColour('#fff')).toEqual([255, 255, 255]);
    expect(() => parseColour('')).toThrow('Found “”');
    expect(() => parseColour('oklch(1 0 0)')).toThrow('oklch');
  });
});

describe('paletteOf', () => {
  it.each([false, true])('runs one way from bare to full cover, dark theme: %s', (dark) => {
    const palette = paletteOf(schemeOf({ kind: 'cover', values: new Uint8Array(1) }), colours(dark));
    const steps = Array.from({ length: 256 }, (_, code) => luminance(entry(palette, code).slice(0, 3)));
    const sign = dark ? 1 : -1;
    for (let i = 8; i < 256; i += 8) expect(sign * (steps[i] - steps[i - 8])).toBeGreaterThan(0);
    expect(entry(palette, 0)).toEqual([...ramp('cover', dark)[0], paint.solid]);
    expect(entry(palette, 255)).toEqual([...ramp('cover', dark)[8], paint.solid]);
  });
  it('spans the closing ramp over the years of the run, and hatches what stays open', () => {
    for (const last of [2060, 2226, 2526]) {
      const palette = paletteOf(closing(last), colours(false));
      expect(entry(palette, closingTexel(2027, 2026, last)).slice(0, 3)).toEqual([
        ...ramp('closing', false)[0],
      ]);
      const end = entry(palette, closingTexel(last, 2026, last));
      ramp('closing', false)[8].forEach((v, i) => {
        expect(Math.abs(end[i] - v)).toBeLessThanOrEqual(2);
      });
      expect(entry(palette, closingCode.open)).toEqual([10, 11, 12, paint.hatched]);
      expect(entry(palette, closingCode.standing)).toEqual([7, 8, 9, paint.solid]);
      expect(entry(palette, closingCode.noData)).toEqual([1, 2, 3, paint.solid]);
    }
  });
  it('paints classes in their own colours and leaves the rest bare', () => {
    const scheme = schemeOf({
      kind: 'classes',
      values: Uint8Array.of(4),
      classes: [{ value: 4, name: 'pan', colour: '#e3dbce' }],
    });
    const palette = paletteOf(scheme, colours(false));
    expect(entry(palette, 0)).toEqual([227, 219, 206, paint.solid]);
    expect(entry(palette, noClassCode)[3]).toBe(paint.bare);
  });
});

it('rampColour meets its stops and lies between them elsewhere', () => {
  const stops: Rgb[] = [
    [0, 0, 0],
    [100, 0, 0],
    [100, 200, 0],
  ];
  expect(rampColour(stops, 0.5)).toEqual([100, 0, 0]);
  expect(rampColour(stops, 0.75)).toEqual([100, 100, 0]);
  expect(rampColour(stops, 7)).toEqual([100, 200, 0]);
  expect(rampColour(stops, -1)).toEqual([0, 0, 0]);
});
