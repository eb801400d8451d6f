import { expect, it } from 'vitest';
import { guessPart } from './guess-part.ts';

it('goes by the name first, even where that part is taken', () => {
  expect(guessPart('2026_Habitat_classes.tif', [])).toBe('habitat');
  expect(guessPart('landcover.tif', ['habitat'])).toBe('habitat');
  for (const name of ['marsh_dem_ft.tif', 'DEM2026.tif', 'site-dtm.tif', 'elev.tif'])
    expect(guessPart(name, [])).toBe('elevation');
  expect(guessPart('demo.tif', [])).toBe('habitat');
  expect(guessPart('cover-2026.tif', ['cover'])).toBe('cover');
  expect(guessPart('surveyed-mounds.tiff', [])).toBe('refuge');
});

it('falls back to what is missing', () => {
  expect(guessPart('survey.tif', [])).toBe('habitat');
  expect(guessPart('survey.tif', ['habitat', 'cover'])).toBe('refuge');
  expect(guessPart('survey.tif', ['habitat', 'cover', 'refuge'])).toBeUndefined();
});
