/**
 * Ranges of EPSG codes of projected CRSs whose unit is the metre, for files that name a code but no unit.
 * From memory of the EPSG registry; a file that names its unit needs no entry here.
 */
const metricRanges: readonly (readonly [first: number, last: number])[] = [
  [2154, 2154], // RGF93 / Lambert-93
  [2157, 2157], // IRENET95 / Irish Transverse Mercator
  [2193, 2193], // NZGD2000 / New Zealand Transverse Mercator
  [3006, 3006], // SWEREF99 TM
  [3034, 3035], // ETRS89 / Europe Lambert conformal and equal area
  [3067, 3067], // ETRS89 / TM35FIN
  [3812, 3812], // ETRS89 / Belgian Lambert 2008
  [5070, 5070], // NAD83 / Conus Albers
  [23028, 23038], // ED50 / UTM
  [25828, 25838], // ETRS89 / UTM
  [26901, 26923], // NAD83 / UTM
  [27700, 27700], // OSGB36 / British National Grid
  [28348, 28358], // GDA94 / Map Grid of Australia
  [28992, 28992], // Amersfoort / RD New
  [31370, 31370], // BD72 / Belgian Lambert 72
  [32601, 32660], // WGS 84 / UTM north
  [32701, 32760], // WGS 84 / UTM south
];

/** Whether a code is on the short list of projected CRSs in metres. */
export const isKnownMetric = (epsg: number): boolean =>
  metricRanges.some(([first, last]) => epsg >= first && epsg <= last);

/**
 * Mercator CRSs of the whole world, whose metres are true on the equator alone: at latitude φ they are stretched by
 * 1/cos φ (Snyder 1987, Map Projections: A Working Manual, eq. 7-3).
 */
export const isWorldMercator = (epsg: number): boolean => [3395, 3857, 900913].includes(epsg);
