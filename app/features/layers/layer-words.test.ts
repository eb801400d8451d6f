import { expect, it } from 'vitest';
import type { Layer } from '#contract/layers.ts';
import { alignmentInWords, noDataInWords } from './layer-words.ts';
import { dependentsInWords } from './remove-layer.tsx';

const made = (alignment: Partial<Layer['alignment']>, bands = 1) =>
  alignmentInWords({
    source: { band: 2, bands } as Layer['source'],
    alignment: { method: 'copy', reprojectedFrom: null, cropped: 0, padded: 0, ...alignment },
  });

it('says what was done to the file, and what was lost by it', () => {
  expect(made({})).toBe('Taken cell by cell: it lies on the cells of the site.');
  expect(made({}, 3)).toMatch(/^Band 2 of 3\. Taken/);
  expect(made({ cropped: 12 })).toBe(
    'Brought onto the grid cell by cell; 12 cells outside the site left out.',
  );
  expect(made({ method: 'bilinear', reprojectedFrom: 'WGS 84', padded: 1 })).toBe(
    'Brought onto the grid from WGS 84 by the four cells around; 1 cell of the site not reached.',
  );
});

it('says how much is there', () => {
  const alignment: Layer['alignment'] = { method: 'copy', reprojectedFrom: null, cropped: 0, padded: 0 };
  expect(noDataInWords({ noDataShare: 0, noData: 255, dataType: 'uint8', alignment })).toBe(
    'Every cell has a value; stored as uint8.',
  );
  expect(
    noDataInWords({
      noDataShare: 0,
      noData: 255,
      dataType: 'uint8',
      alignment: { ...alignment, padded: 11 },
    }),
  ).toBe('Every cell that the file reaches has a value; stored as uint8.');
  expect(noDataInWords({ noDataShare: 0.1, noData: -9999, dataType: 'float32', alignment })).toBe(
    '10 % of the cells have no data (marked -9999); stored as float32.',
  );
});

it('says what depends on a layer, and that it keeps it', () => {
  expect(dependentsInWords(undefined, false)).toMatch(/Looking/);
  expect(dependentsInWords(undefined, true)).toMatch(/could not be asked/);
  expect(
    dependentsInWords(
      { runs: 0, runNames: [], comparisons: 2, consequences: ['No run can start without it.'] },
      false,
    ),
  ).toBe('No run can start without it. No run stands on it. 2 comparisons stand on it too.');
  expect(
    dependentsInWords({ runs: 5, runNames: ['A', 'B', 'C', 'D'], comparisons: 0, consequences: [] }, false),
  ).toBe('5 runs stand on it (A, B, C and others) and keep it.');
});
