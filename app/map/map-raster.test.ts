// @vitest-environment node
import { describe, expect, it } from 'vitest';
import {
  closingCode,
  closingTexel,
  describeCell,
  noClassCode,
  sameTexels,
  toTexels,
  type MapRaster,
} from './map-raster.ts';

const closing = (values: number[]): MapRaster => ({
  kind: 'closing',
  values: Int16Array.from(values),
  surveyYear: 2026,
  lastYear: 2060,
});
const classes: MapRaster = {
  kind: 'classes',
  values: Int16Array.of(1, 9, -1, 3),
  classes: [
    { value: 3, name: 'bare pan', colour: '#e3dbce' },
    { value: 1, name: 'marsh', colour: '#5b825a' },
  ],
  noData: -1,
};

describe('toTexels', () => {
  it('sends shares as they are, without a copy', () => {
    const values = Uint8Array.of(0, 128, 255);
    expect(toTexels({ kind: 'cover', values })).toBe(values);
  });
  it('tells closing years, open, standing and no data apart', () => {
    expect([...toTexels(closing([-32768, 0, 2026, 2027, 2060]))]).toEqual([
      closingCode.noData,
      closingCode.open,
      closingCode.standing,
      closingCode.first,
      closingCode.first + 33,
    ]);
  });
  it('numbers classes by their row, whatever their value', () => {
    expect([...toTexels(classes)]).toEqual([1, noClassCode, noClassCode, 0]);
  });
  it('refuses more classes than a byte can tell apart', () => {
    const many = Array.from({ length: 256 }, (_, value) => ({ value, name: 'c', colour: '#000000' }));
    expect(() => toTexels({ kind: 'classes', values: Uint8Array.of(1), classes: many })).toThrow(
      /256 classes/,
    );
  });
});

describe('sameTexels', () => {
  const renamed = {
    ...classes,
    classes: classes.classes.map((c) => ({ ...c, name: 'x', colour: '#000000' })),
  };
  const swapped = { ...classes, classes: [...classes.classes].reverse() };
  const years = closing([2041, 0]);
  const values = Uint8Array.of(1, 2);
  it.each<[string, MapRaster, MapRaster, boolean]>([
    ['a class by another name and colour', classes, renamed, true],
    ['classes in another order', classes, swapped, false],
    ['another value for no data', classes, { ...classes, noData: 9 }, false],
    ['other cells', classes, { ...classes, values: Int16Array.of(1, 9, -1, 3) }, false],
    ['the same years', years, { ...years }, true],
    ['another horizon', years, { ...years, lastYear: 2100 } as MapRaster, false],
    ['a share by another name', { kind: 'cover', values }, { kind: 'share', values, name: 'refuge' }, true],
    ['shares as classes', { kind: 'cover', values }, { ...classes, values }, false],
  ])('%s', (_, a, b, same) => {
    expect(sameTexels(a, b)).toBe(same);
    if (same) expect(toTexels(a)).toEqual(toTexels(b));
  });
});

describe('closingTexel', () => {
  it.each([1, 253, 254, 500])(
    'keeps %i years in order, inside a byte and apart from the special codes',
    (years) => {
      const last = 2026 + years;
      let before: number = closingCode.first;
      for (let year = 2027; year <= last; year++) {
        const code = closingTexel(year, 2026, last);
        expect(code).toBeGreaterThanOrEqual(before);
        expect(code).toBeLessThanOrEqual(255);
        if (years <= 253) expect(code).toBe(closingCode.first + year - 2027);
        before = code;
      }
    },
  );
});

describe('describeCell', () => {
  it.each([
    [{ kind: 'cover', values: Uint8Array.of(161) } satisfies MapRaster, 'cover 63 %'],
    [{ kind: 'share', values: Uint8Array.of(255), name: 'refuge' } satisfies MapRaster, 'refuge 100 %'],
    [closing([2041]), 'closes in 2041'],
    [closing([2026]), 'stood at the survey'],
    [closing([0]), 'still open in 2060'],
    [closing([-32768]), 'cannot hold the plant'],
    [classes, 'marsh'],
  ])('says what stands in a cell: %#', (raster, words) => {
    expect(describeCell(raster, undefined, 0)).toBe(words);
  });
  it('says that ground without capacity cannot hold the plant, but names its class', () => {
    const water = Uint8Array.of(0);
    expect(describeCell({ kind: 'cover', values: Uint8Array.of(0) }, water, 0)).toBe('cannot hold the plant');
    expect(describeCell(classes, water, 0)).toBe('marsh');
    expect(describeCell(classes, undefined, 1)).toBe('class 9, not in the table');
    expect(describeCell(classes, undefined, 2)).toBe('no data');
  });
});

describe('a difference', () => {
  const raster = {
    kind: 'difference',
    values: Uint8Array.of(1, 128, 255, 140),
    name: 'cover against Wait',
  } as const;
  it('is read with its sign, and goes to the card as it is', () => {
    expect(toTexels(raster)).toBe(raster.values);
    expect([0, 1, 2, 3].map((cell) => describeCell(raster, undefined, cell))).toEqual([
      'cover against Wait −100 points',
      'cover against Wait alike',
      'cover against Wait +100 points',
      'cover against Wait +9 points',
    ]);
  });
});

it('says of a share what all of it is, where that is no share of 1', () => {
  const gain: MapRaster = {
    kind: 'share',
    values: Uint8Array.of(0, 51, 255),
    name: 'growth sooner by',
    most: { value: 0.031, unit: 'years' },
  };
  expect([0, 1, 2].map((cell) => describeCell(gain, undefined, cell))).toEqual([
    'growth sooner by 0 years',
    'growth sooner by 0.0062 years',
    'growth sooner by 0.031 years',
  ]);
});
