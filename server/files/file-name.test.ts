import { expect, test } from 'vitest';
import { safeFileName, shownFileName } from './file-name.ts';

test('export names read well and hold nothing that a file system or a header could stumble over', () => {
  expect(safeFileName(['Sallow Reach', '40 mounds, scattered', 'cover', 2040], 'tif')).toBe(
    'Sallow-Reach_40-mounds-scattered_cover_2040.tif',
  );
  expect(safeFileName(['Crêpuscule /../"\r\n', 'x'.repeat(100)], 'csv')).toBe(
    `Crepuscule_${'x'.repeat(60)}.csv`,
  );
  expect(safeFileName(['塩沼', '…'], 'csv')).toBe('export.csv');
});

test('a client’s file name is shown without its folders and control characters', () => {
  expect(shownFileName('C:\\rasters\\habitat.tif')).toBe('habitat.tif');
  expect(shownFileName('../../etc/pass\u0000wd')).toBe('passwd');
  expect(shownFileName('folder/')).toBe('unnamed');
});
