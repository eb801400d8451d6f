import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import {
  mostOtherOutlooks,
  onSpan,
  otherOutlookSchema,
  outlookSchema,
  type OtherOutlook,
  type Outlook,
} from '#contract/outlooks.ts';
import type { StoredRecord } from '#contract/drought-records.ts';
import type { Site } from '#contract/sites.ts';
import type { DroughtRecord } from '#sim-core/spec/drought-record.ts';
import { yearlyRecord } from '#sim-core/weather/yearly-record.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { storedRecordOf } from '#server/specs/drought-record.ts';
import { deleteRecordRow, insertRecord, recordsOf } from '#server/specs/drought-record.repository.ts';
import { siteReply } from '../site-reply.ts';
import { findSite, updateSite } from '../site.repository.ts';

export interface OutlookAddress {
  siteId: string;
  outlookId: string;
}

interface Outlooks {
  main: Outlook;
  others: OtherOutlook[];
}

const otherOutlooksOf = ({ otherOutlooks }: SiteRow): OtherOutlook[] =>
  otherOutlooks === null ? [] : readJson(z.array(otherOutlookSchema), otherOutlooks);

/** Changes the outlooks of a site; all are brought onto the span of the one that `make` names. */
const change = (
  services: Services,
  siteId: string,
  make: (outlooks: Outlooks) => Outlooks & { span: Outlook; set?: boolean },
): Promise<Site> =>
  services.write(async (manager) => {
    const site = await findSite(manager, siteId);
    if (!site) throw notFound();
    const { main, others, span, set } = make({
      main: readJson(outlookSchema, site.outlook),
      others: otherOutlooksOf(site),
    });
    const names = [main, ...others].map(({ name }) => name);
    const twice = names.find((name, i) => names.indexOf(name) !== i);
    if (twice !== undefined)
      throw fieldProblem('name', `This site has an outlook “${twice}” already; give another name`);
    await updateSite(manager, siteId, {
      outlook: JSON.stringify(onSpan(main, span)),
      otherOutlooks: JSON.stringify(others.map((other) => onSpan(other, span))),
      ...(set && { outlookSet: true }),
    });
    return siteReply(manager, siteId);
  });

export const setOutlook = (services: Services, siteId: string, outlook: Outlook): Promise<Site> =>
  change(services, siteId, ({ others }) => ({ main: outlook, others, span: outlook, set: true }));

/** @throws ProblemError at a name that is taken, or where no further one may be kept */
export const addOutlook = (services: Services, siteId: string, outlook: Outlook): Promise<Site> =>
  change(services, siteId, ({ main, others }) => {
    if (others.length >= mostOtherOutlooks)
      throw new ProblemError(
        'conflict',
        `This site has ${others.length + 1} outlooks; no more are kept. Forget one first.`,
      );
    return { main, others: [...others, { ...outlook, id: randomUUID() }], span: main };
  });

/** @throws ProblemError `not-found` */
export const changeOutlook = (
  services: Services,
  { siteId, outlookId }: OutlookAddress,
  outlook: Outlook,
): Promise<Site> =>
  change(services, siteId, ({ main, others }) => ({
    main,
    others: others.with(placeOf(others, outlookId), { ...outlook, id: outlookId }),
    span: outlook,
  }));

/** @throws ProblemError `not-found` */
export const deleteOutlook = (services: Services, { siteId, outlookId }: OutlookAddress): Promise<Site> =>
  change(services, siteId, ({ main, others }) => ({
    main,
    others: others.toSpliced(placeOf(others, outlookId), 1),
    span: main,
  }));

/** @throws ProblemError `not-found` */
export const makeMainOutlook = (services: Services, { siteId, outlookId }: OutlookAddress): Promise<Site> =>
  change(services, siteId, ({ main, others }) => {
    const place = placeOf(others, outlookId);
    const { id, ...chosen } = others[place];
    return { main: chosen, others: others.with(place, { ...main, id }), span: main, set: true };
  });

function placeOf(others: readonly OtherOutlook[], outlookId: string): number {
  const place = others.findIndex(({ id }) => id === outlookId);
  if (place < 0) throw notFound();
  return place;
}

/** The records of a site with their values. */
export const listDroughtRecords = async (manager: Manager, siteId: string): Promise<StoredRecord[]> =>
  (await recordsOf(manager, siteId)).map(storedRecordOf);

/** @throws ProblemError at `record.values` where a date stands twice, or no year has all of its season */
export async function addDroughtRecord(
  services: Services,
  siteId: string,
  { record, fileName }: { record: DroughtRecord; fileName: string },
  by: string,
): Promise<Site> {
  requireDates(record);
  return services.write(async (manager) => {
    if (!(await findSite(manager, siteId))) throw notFound();
    await insertRecord(manager, {
      ...{ id: randomUUID(), siteId, record: JSON.stringify(record), fileName },
      ...{ uploadedAt: services.clock().toISOString(), uploadedBy: by, replacedAt: null },
    });
    return siteReply(manager, siteId);
  });
}

function requireDates(record: DroughtRecord): void {
  const seen = new Set<string>();
  const monthly = record.values[0].month !== undefined;
  for (const [i, { year, month }] of record.values.entries()) {
    const date = `${year}-${month ?? ''}`;
    const at = `record.values.${i}`;
    if ((month !== undefined) !== monthly)
      throw fieldProblem(at, 'Some values have a month and some have none; give all by year or all by month');
    if (seen.has(date))
      throw fieldProblem(at, `${year}${month ? `-${month}` : ''} stands in the record twice`);
    seen.add(date);
  }
  if (yearlyRecord(record).years.length === 0)
    throw fieldProblem('record.values', 'No year has a value for every month of the season');
}

/** @throws ProblemError `not-found` */
export const deleteDroughtRecord = (services: Services, siteId: string, recordId: string): Promise<Site> =>
  services.write(async (manager) => {
    if (!(await deleteRecordRow(manager, siteId, recordId))) throw notFound();
    return siteReply(manager, siteId);
  });
