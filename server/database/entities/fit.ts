import { EntitySchema } from 'typeorm';
import { SiteEntity } from './site.ts';

/** A fit of rates to later surveys. `plan`, `state`, `grid` and `accepted` are JSON of the contract's schemas. */
export interface FitRow {
  id: string;
  siteId: string;
  name: string;
  status: string;
  plan: string;
  state: string;
  /** of `state`, for lists */
  runs: number;
  generations: number;
  /** the site's grid as it was when the fit began */
  grid: string;
  accepted: string | null;
  startedAt: string;
  startedBy: string;
}

export const FitEntity = new EntitySchema<FitRow>({
  name: 'Fit',
  tableName: 'fit',
  columns: {
    id: { type: 'text', primary: true },
    siteId: { type: 'text' },
    name: { type: 'text' },
    status: { type: 'text' },
    plan: { type: 'text' },
    state: { type: 'text' },
    runs: { type: 'integer' },
    generations: { type: 'integer' },
    grid: { type: 'text' },
    accepted: { type: 'text', nullable: true },
    startedAt: { type: 'text' },
    startedBy: { type: 'text' },
  },
  indices: [{ name: 'fit_by_site', columns: ['siteId', 'startedAt'] }],
  foreignKeys: [
    {
      name: 'fit_site',
      target: SiteEntity,
      columnNames: ['siteId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});

/** A raster that a fit stands on: of the ground of its runs, or a resurvey. */
export interface FitLayerRow {
  fitId: string;
  hash: string;
}
export const FitLayerEntity = new EntitySchema<FitLayerRow>({
  name: 'FitLayer',
  tableName: 'fit_layer',
  columns: {
    fitId: { type: 'text', primary: true },
    hash: { type: 'text', primary: true },
  },
  indices: [{ name: 'fit_layer_by_hash', columns: ['hash'] }],
  foreignKeys: [
    {
      name: 'fit_layer_fit',
      target: FitEntity,
      columnNames: ['fitId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
});
