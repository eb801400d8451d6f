import type { SiteRecord, StoredRecord } from '#contract/drought-records.ts';
import { droughtRecordSchema } from '#sim-core/spec/drought-record.ts';
import { yearlyRecord, type YearIndex } from '#sim-core/weather/yearly-record.ts';
import type { DroughtRecordRow } from '#server/database/entities/drought-record.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { recordInUse } from './drought-record.repository.ts';

/** A stored record as the contract shows it. */
export function storedRecordOf(row: DroughtRecordRow): StoredRecord {
  const { id, fileName, uploadedAt, uploadedBy, replacedAt } = row;
  const record = readJson(droughtRecordSchema, row.record);
  return { ...record, id, fileName, uploadedAt, uploadedBy, replacedAt };
}

/** The record that a site uses, by year; null where it has none. */
export async function siteRecord(manager: Manager, siteId: string): Promise<SiteRecord | null> {
  const row = await recordInUse(manager, siteId);
  if (!row) return null;
  const { values, ...rest } = storedRecordOf(row);
  const { years, gaps } = yearlyRecord({ ...rest, values });
  return { ...rest, years: [...years], gaps: [...gaps] };
}

/** Its years on the Palmer scale, as cautions read them. */
export const recordYears = async (manager: Manager, siteId: string): Promise<YearIndex[] | undefined> =>
  (await siteRecord(manager, siteId))?.years;
