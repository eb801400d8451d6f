import { randomUUID } from 'node:crypto';
import { unchangedOutlook, type Outlook } from '#contract/outlooks.ts';
import type { Plant } from '#contract/plants.ts';
import type { OptionRow } from '#server/database/entities/option.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';

const defaultHorizon = 34;

/** An outlook to start from: the survey is this year's, and no year is dry. */
const defaultOutlook = (thisYear: number): Outlook => ({
  ...unchangedOutlook,
  surveyYear: thisYear,
  years: defaultHorizon,
  stepsPerYear: 1,
  boundary: 'mirror',
  droughtIndex: Array.from({ length: defaultHorizon }, () => 0),
  drawn: null,
});

const defaultPlant: Plant = {
  name: 'Plant',
  rates: defaultRates,
  beliefs: {},
  sources: {},
  fieldNumbers: {},
};

/** The rows of a new site: a default plant, a default outlook, and the option that does nothing. */
export function newSiteRows({
  teamId,
  name,
  by,
  grid,
  crsName,
  now,
  invented = false,
}: {
  teamId: string;
  name: string;
  /** the name of whoever makes it */
  by: string;
  grid: Grid;
  crsName: string;
  now: Date;
  invented?: boolean;
}): { site: SiteRow; wait: OptionRow } {
  const createdAt = now.toISOString();
  const site: SiteRow = {
    id: randomUUID(),
    teamId,
    name,
    invented,
    ...grid,
    crsName,
    finestGrid: null,
    elevationCurves: null,
    tidalDatums: null,
    plant: JSON.stringify(defaultPlant),
    plantSet: false,
    plantOrigin: null,
    outlook: JSON.stringify(defaultOutlook(now.getUTCFullYear())),
    outlookSet: false,
    otherOutlooks: null,
    createdAt,
  };
  const wait: OptionRow = {
    id: randomUUID(),
    siteId: site.id,
    wait: true,
    place: 0,
    name: 'Wait',
    note: '',
    archived: false,
    works: '[]',
    sets: '[]',
    revision: 1,
    createdAt,
    changedAt: createdAt,
    changedBy: by,
  };
  return { site, wait };
}
