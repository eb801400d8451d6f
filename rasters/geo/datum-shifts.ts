/** Moves coordinates of a datum into WGS 84. */
export interface ShiftToWgs84 {
  /** proj4's +towgs84: metres, and for seven numbers arc seconds (position vector) and parts per million */
  readonly towgs84: string;
  /** accuracy that the EPSG register states, m; null where it states none */
  readonly accuracy: number | null;
}

/**
 * Shifts of datums whose CRSs the register lists without one, or with a grid file that is not shipped here.
 * Numbers and accuracies of the EPSG operation named beside each, as PROJ 9.1.1's copy of the register has them.
 */
const shifts: Readonly<Record<string, ShiftToWgs84>> = {
  North_American_Datum_1983: zero(4), // EPSG:1188
  NAD83_National_Spatial_Reference_System_2007: zero(2), // EPSG:15931
  NAD83_National_Spatial_Reference_System_2011: zero(2), // EPSG:9774
  NAD83_Canadian_Spatial_Reference_System: zero(2), // EPSG:1842
  European_Terrestrial_Reference_System_1989: zero(1), // EPSG:1149
  Geocentric_Datum_of_Australia_1994: zero(3), // EPSG:1150
  Geocentric_Datum_of_Australia_2020: zero(3), // EPSG:8450
  New_Zealand_Geodetic_Datum_2000: zero(1), // EPSG:1565
  Sistema_de_Referencia_Geocentrico_para_las_AmericaS_2000: zero(1), // EPSG:15894
  Japanese_Geodetic_Datum_2000: zero(1), // EPSG:1826
  Japanese_Geodetic_Datum_2011: zero(1), // EPSG:9936
  Ordnance_Survey_of_Great_Britain_1936: {
    towgs84: '446.448,-125.157,542.06,0.15,0.247,0.842,-20.489', // EPSG:1314
    accuracy: 2,
  },
  New_Zealand_Geodetic_Datum_1949: {
    towgs84: '59.47,-5.04,187.44,0.47,-0.1,1.024,-4.5993', // EPSG:1564, its rotations turned to position vector
    accuracy: 4,
  },
  Deutsches_Hauptdreiecksnetz: {
    towgs84: '598.1,73.7,418.2,0.202,0.045,-2.455,6.7', // EPSG:1777
    accuracy: 3,
  },
};

function zero(accuracy: number): ShiftToWgs84 {
  return { towgs84: '0,0,0', accuracy };
}

const wgs84 = 'WGS_1984';

/**
 * How a datum is moved into WGS 84, or undefined where that takes a grid file or is not known. An accuracy of 0 is that
 * of WGS 84 itself.
 * @param proj4 the register's definition of a CRS on this datum, whose own +towgs84 counts where the list has none
 * @param accuracy what the register says of that shift
 */
export function shiftToWgs84(
  datum: string,
  proj4: string,
  accuracy: number | null,
): ShiftToWgs84 | undefined {
  if (datum === wgs84) return zero(0);
  const listed = shifts[datum];
  if (listed) return listed;
  const own = /\+towgs84=(\S+)/.exec(proj4)?.[1];
  return own === undefined ? undefined : { towgs84: own, accuracy };
}
