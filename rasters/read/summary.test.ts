import { describe, expect, it } from 'vitest';
import { validateOnGrid } from './on-grid.ts';
import type { Raster } from './raster.ts';
import { histogramBins, summarise } from './summary.ts';

const grid = { width: 4, height: 2, cellSize: 1, originX: 412_200, originY: 5_301_750, epsg: 32631 };
const raster = (
  values: Raster['values'],
  dataType: Raster['dataType'],
  noData: number | null = null,
): Raster => ({
  grid: { ...grid, width: values.length, height: 1 },
  crsName: 'EPSG:32631',
  dataType,
  noData,
  values,
});

describe('summarise', () => {
  it('counts classes and leaves no data out', () => {
    const summary = summarise(raster(Uint8Array.of(3, 1, 1, 255, 2, 1, 3, 255), 'uint8', 255));
    expect(summary).toMatchObject({ noDataShare: 0.25, minimum: 1, maximum: 3, unit: 'percent' });
    expect(summary.classCounts).toEqual([
      { value: 1, cells: 3 },
      { value: 2, cells: 1 },
      { value: 3, cells: 2 },
    ]);
  });

  it('fills 64 bins from minimum to maximum, the maximum in the last', () => {
    const { histogram } = summarise(raster(Float32Array.of(0, 0.49, 0.5, 1, NaN, 1, 0.01, 0), 'float32'));
    expect(histogram).toHaveLength(histogramBins);
    expect([histogram[0], histogram[31], histogram[32], histogram[63]]).toEqual([3, 1, 1, 2]);
    expect(histogram.reduce((a, b) => a + b)).toBe(7);
  });

  it('puts all into one bin where all are alike', () => {
    const { histogram, minimum, maximum } = summarise(raster(Int16Array.of(7, 7, 7), 'int16'));
    expect([minimum, maximum, histogram[0]]).toEqual([7, 7, 3]);
  });

  it('names no classes where values are fractions or too many', () => {
    expect(summarise(raster(Float32Array.of(1, 2, 2.5), 'float32')).classCounts).toBeNull();
    expect(summarise(raster(Float32Array.of(1, 2, 2), 'float32')).classCounts).toHaveLength(2);
    const many = (n: number) =>
      summarise(
        raster(
          Uint16Array.from({ length: n }, (_, i) => i),
          'uint16',
        ),
      );
    expect(many(256).classCounts).toHaveLength(256);
    expect(many(257).classCounts).toBeNull();
  });

  it.each([
    [Uint8Array.of(0, 1, 1), 'uint8', 'presence'],
    [Uint8Array.of(0, 40, 100), 'uint8', 'percent'],
    [Uint8Array.of(0, 101), 'uint8', 'byte'],
    [Float32Array.of(0, 0.5, 1), 'float32', 'share'],
    [Float32Array.of(0, 55.5), 'float32', 'percent'],
    [Float32Array.of(-0.2, 0.7), 'float32', 'share'],
  ] as const)('guesses the unit of %o', (values, type, unit) => {
    expect(summarise(raster(values, type)).unit).toBe(unit);
  });
});

describe('validateOnGrid', () => {
  it('takes the same cells', () => {
    expect(() => validateOnGrid({ grid: { ...grid } }, grid)).not.toThrow();
  });

  it('names all that differs and how to mend it', () => {
    const found = { ...grid, cellSize: 2, originX: 412_201, epsg: 32632 };
    expect(() => validateOnGrid({ grid: found }, grid)).toThrow(
      expect.objectContaining({
        code: 'grid-mismatch',
        found:
          'EPSG:32632 instead of EPSG:32631; cells of 2 m instead of 1 m; north-west corner at 412201, 5301750 instead of 412200, 5301750',
        remedy: expect.stringContaining('-te 412200 5301748 412204 5301750 -tr 1 1') as string,
      }),
    );
  });
});
