import { cellAt, type Grid } from '#sim-core/grid/grid.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { habitatValue } from './classes.ts';
import { coverNoData, makeLandscape } from './landscape.ts';
import { scatterPoints } from './mounds.ts';

/** Sallow Reach: an invented site at an arbitrary place in UTM zone 31 N, cells of 1 m. */
export const demoGrid: Grid = {
  width: 640,
  height: 372,
  cellSize: 1,
  originX: 412_200,
  originY: 5_302_110,
  epsg: 32631,
};
export const demoCrsName = 'WGS 84 / UTM zone 31N';
export const demoSurveyYear = 2026;

const seed = 2026;

export interface DemoRaster {
  readonly name: 'habitat' | 'cover' | 'refuge' | 'elevation';
  readonly fileName: string;
  /** a GeoTIFF */
  readonly bytes: Uint8Array;
}

/** The four rasters of the invented site, the same bytes each time and everywhere. */
export function demoRasters(): DemoRaster[] {
  const { habitat, cover, refuge, elevation } = makeLandscape(demoGrid.width, demoGrid.height, seed);
  const shared = { grid: demoGrid, crsName: demoCrsName };
  const facts = (what: string) => ({
    DATA_ORIGIN: 'invented demo data',
    SITE: 'Sallow Reach (invented)',
    WHAT: `${what}, as at the end of ${demoSurveyYear}`,
  });
  return [
    {
      name: 'habitat',
      fileName: 'habitat.tif',
      bytes: encodeGeoTiff({
        ...shared,
        values: habitat,
        noData: habitatValue.noData,
        bandName: 'habitat class',
        facts: facts('Habitat: 1 creek, 2 creek bank, 3 low platform, 4 high platform, 5 levee'),
      }),
    },
    {
      name: 'cover',
      fileName: 'cover.tif',
      bytes: encodeGeoTiff(
        {
          ...shared,
          values: cover,
          noData: coverNoData,
          bandName: 'cover',
          unit: 'share',
          facts: facts('Plant cover'),
        },
        { blocks: 'tiles' },
      ),
    },
    {
      name: 'refuge',
      fileName: 'refuge.tif',
      bytes: encodeGeoTiff({
        ...shared,
        values: refuge,
        bandName: 'refuge strength',
        unit: 'share',
        facts: facts('Strength of refuges on mounds'),
      }),
    },
    {
      name: 'elevation',
      fileName: 'elevation.tif',
      bytes: encodeGeoTiff({
        ...shared,
        values: elevation,
        bandName: 'height above an invented datum',
        unit: 'm',
        facts: facts('Elevation in metres above an invented datum'),
      }),
    },
  ];
}

/** Places for an option's mounds: 40 points scattered over bare ground, at least 14 m apart, in the site's CRS. */
export function demoMounds(): { x: number; y: number }[] {
  const { width, height, originX, originY } = demoGrid;
  const { bareAt, cover } = makeLandscape(width, height, seed);
  const bareAndEmpty = (x: number, y: number) =>
    bareAt(x, y) && cover[Math.floor(y) * width + Math.floor(x)] === 0;
  return scatterPoints(width, height, seed + 71, { count: 40, apart: 14, allowed: bareAndEmpty })
    .map(({ x, y }) => ({ x: originX + x, y: originY - y }))
    .filter(({ x, y }) => cellAt(demoGrid, x, y));
}
