// @vitest-environment node
import { expect, it } from 'vitest';
import { kindNamed } from './record-words.ts';

it('takes a column for what its name says', () => {
  for (const name of ['SPEI', 'spei12', 'SPI-3', 'monthly_spi', 'SPEI (12 months)'])
    expect(kindNamed(name)).toBe('standardised');
  for (const name of ['pdsi', 'PDSI', 'spine', 'index', 'Column 2', undefined])
    expect(kindNamed(name)).toBe('palmer');
});
