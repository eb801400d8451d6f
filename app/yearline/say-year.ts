import { formatArea, formatNumber, formatShare } from '#app/lib/formats.ts';
import type { YearRecord } from './year-records.ts';

/** One year in words, for those who hear the yearline: `2043: cover 78 %, index −0.4, 1.2 ha closed`. */
export function sayYear(
  year: number,
  record: YearRecord | undefined,
  droughtIndex: number | null | undefined,
  happenings: readonly string[] = [],
): string {
  const parts = [
    record && `cover ${formatShare(record.coverShare)}`,
    typeof droughtIndex === 'number' && `index ${formatNumber(droughtIndex, 1)}`,
    record && record.droughtIndex !== null && `${formatArea(record.closingArea)} closed`,
    ...happenings,
  ].filter((part) => part);
  return parts.length ? `${year}: ${parts.join(', ')}` : `${year}`;
}
