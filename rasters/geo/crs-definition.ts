/** A CRS as the EPSG register has it, with what our transformations can do with it. */
export interface CrsDefinition {
  readonly epsg: number;
  readonly name: string;
  readonly kind: 'projected' | 'geographic';
  readonly unit: 'metre' | 'foot' | 'us-foot' | 'degree' | 'other';
  /** the unit's length in metres; null for degrees */
  readonly metresPerUnit: number | null;
  /** name of the geodetic datum */
  readonly datum: string;
  /** where it is meant to be used, in degrees; null where the register does not say */
  readonly use: { west: number; south: number; east: number; north: number } | null;
  /** whether coordinates run east and north, as nearly all do; southern African ones run west and south */
  readonly eastNorth: boolean;
  /** definition for proj4 */
  readonly proj4: string;
  /** accuracy of the shift to WGS 84 that the definition holds, m, as the register states it */
  readonly accuracy: number | null;
}

/** What a move from one CRS into another is worth. */
export interface DatumShift {
  readonly from: string;
  readonly to: string;
  /** how far off a point may lie, m, as the EPSG register states it; null where nobody says */
  readonly accuracy: number | null;
}
