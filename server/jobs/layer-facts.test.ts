import { describe, expect, it } from 'vitest';
import type { LayerFacts } from '#contract/layers.ts';
import { fitsUnit, valueComplaint } from './layer-facts.ts';

const facts = (changes: Partial<LayerFacts>): LayerFacts => ({
  dataType: 'float32',
  crsName: 'EPSG:32631',
  noData: null,
  noDataShare: 0,
  minimum: 0,
  maximum: 1,
  histogram: [],
  classCounts: null,
  ...changes,
});

describe('fitsUnit', () => {
  it.each([
    ['share', 'float32', 0, 1, true],
    ['share', 'float32', 0, 1.01, false],
    ['share', 'float32', -0.01, 1, false],
    ['percent', 'uint8', 0, 100, true],
    ['percent', 'uint8', 0, 101, false],
    ['byte', 'uint8', 0, 255, true],
    ['byte', 'uint16', 0, 256, false],
    ['presence', 'uint8', 0, 1, true],
    ['presence', 'uint8', 0, 2, false],
    ['presence', 'float32', 0, 1, false],
  ] as const)('%s of %s from %d to %d: %s', (unit, dataType, minimum, maximum, fits) => {
    expect(fitsUnit({ dataType, minimum, maximum }, unit)).toBe(fits);
  });
});

describe('valueComplaint', () => {
  it('takes habitat with classes, whole numbers of any type', () => {
    const classed = facts({ minimum: -3, maximum: 900, classCounts: [{ value: -3, cells: 4 }] });
    expect(valueComplaint('habitat', classed, 'byte')).toBeUndefined();
    expect(valueComplaint('habitat', facts({}), 'share')?.expected).toContain('at most 256');
  });

  it('takes shares for cover and refuge, and names the no-data value that was probably meant', () => {
    expect(valueComplaint('cover', facts({}), 'share')).toBeUndefined();
    expect(valueComplaint('refuge', facts({ minimum: -9999 }), 'share')?.remedy).toContain('-a_nodata -9999');
    expect(valueComplaint('refuge', facts({ maximum: 4000 }), 'byte')?.found).toBe('values from 0 to 4000');
  });
});
