import type { Layer } from '#contract/layers.ts';
import { unchangedOutlook } from '#contract/outlooks.ts';
import type { Site } from '#contract/sites.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;

const gridFixture = { width: 6, height: 4, cellSize: 1, originX: 1000, originY: 2000, epsg: 32631 };

export const layerFixture = (part: Layer['part'], more: Partial<Layer> = {}): Layer => ({
  id: id(10 + part.length),
  part,
  year: null,
  hash: part === 'habitat' ? 'a'.repeat(64) : part === 'cover' ? 'b'.repeat(64) : 'c'.repeat(64),
  bytes: 1000,
  grid: gridFixture,
  source: {
    fileName: `${part}.tif`,
    hash: 'd'.repeat(64),
    bytes: 1000,
    uploadedAt: '2026-12-01T08:00:00.000Z',
    uploadedBy: 'Invented Person',
    crsName: 'an invented CRS',
    epsg: 32631,
    width: 6,
    height: 4,
    cellWidth: 1,
    cellHeight: 1,
    band: 1,
    bands: 1,
    scale: 1,
    offset: 0,
  },
  alignment: { method: 'copy', reprojectedFrom: null, cropped: 0, padded: 0 },
  note: '',
  dataType: part === 'habitat' ? 'uint8' : 'float32',
  crsName: 'an invented CRS',
  noData: null,
  noDataShare: 0,
  minimum: 0,
  maximum: 1,
  histogram: [],
  classCounts: null,
  unit: 'share',
  vertical: part === 'elevation' ? { datum: '', unit: 'metre' } : null,
  classes:
    part === 'habitat'
      ? [
          { value: 1, name: 'creek', colour: '#b7c4ce', capacity: 0, vigour: 0 },
          { value: 2, name: 'marsh', colour: '#5b825a', capacity: 0.9, vigour: 1 },
        ]
      : null,
  ...more,
});

/** A small invented site that is ready to run. */
export const siteFixture = (more: Partial<Site> = {}): Site => ({
  id: id(1),
  teamId: id(2),
  name: 'Invented Reach',
  invented: true,
  createdAt: '2026-12-01T08:00:00.000Z',
  grid: gridFixture,
  finestGrid: gridFixture,
  parts: ['habitat', 'cover', 'refuge'],
  options: 2,
  runs: 0,
  crsName: 'an invented CRS',
  layers: [
    layerFixture('habitat'),
    layerFixture('cover', { unit: 'percent', maximum: 100 }),
    layerFixture('refuge', { unit: 'byte', maximum: 255, dataType: 'uint8' }),
  ],
  features: [],
  elevationCurves: { capacity: null, vigour: null, exposure: null },
  tidalDatums: [],
  plant: { name: 'Invented grass', rates: defaultRates, beliefs: {}, sources: {}, fieldNumbers: {} },
  plantSet: true,
  plantOrigin: null,
  outlook: {
    ...unchangedOutlook,
    surveyYear: 2026,
    years: 4,
    stepsPerYear: 1,
    boundary: 'mirror',
    droughtIndex: [0, -1, -4, 0],
    drawn: null,
  },
  outlookSet: true,
  otherOutlooks: [],
  droughtRecord: null,
  ...more,
});
