import type { DroughtRecord, IndexKind } from '#sim-core/spec/drought-record.ts';
import { formatNumber } from '#app/lib/formats.ts';

export const monthNames = [
  ...['January', 'February', 'March', 'April', 'May', 'June'],
  ...['July', 'August', 'September', 'October', 'November', 'December'],
] as const;

export const kindWords = { palmer: 'Palmer-type index', standardised: 'SPEI or SPI' } as const;

/** What a column holds by its name: `SPEI`, `spi_12` and `SPEI12` are standardised, all else is taken as Palmer-type. */
export const kindNamed = (column = ''): IndexKind =>
  /(^|[^a-z])spe?i([^a-z]|$)/i.test(column) ? 'standardised' : 'palmer';

/** How a record is read: said wherever it shows. */
export function mappingWords(
  { kind, factor, season }: Pick<DroughtRecord, 'kind' | 'factor' | 'season'>,
  monthly: boolean,
): string {
  const read =
    kind === 'palmer' && factor === 1
      ? 'a Palmer-type index, as it stands'
      : kind === 'palmer'
        ? `a Palmer-type index, times ${formatNumber(factor)}`
        : `an SPEI or SPI, times ${formatNumber(factor)} on the Palmer scale`;
  if (!monthly) return read;
  const whole = (season.to - season.from + 12) % 12 === 11;
  return `${read}; each year the mean of ${
    whole ? 'its months' : `${monthNames[season.from - 1]} to ${monthNames[season.to - 1]}`
  }`;
}

/**
 * McKee, Doesken & Kleist 1993 (8th Conference on Applied Climatology, 179–184) begin moderate, severe and extreme drought
 * at an SPI of −1, −1.5 and −2; Palmer 1965 at −2, −3 and −4. A factor of 2 makes the classes meet.
 */
export const usualFactor = { palmer: 1, standardised: 2 } as const;
export const factorNote =
  'A factor of 2 makes the classes meet: moderate, severe and extreme drought begin at −1, −1.5 and −2 of the SPI (McKee and others 1993), at −2, −3 and −4 of Palmer’s index (1965). That one may be turned into the other this way, and that SPEI may be read by the classes of SPI, is common practice without a source.';
