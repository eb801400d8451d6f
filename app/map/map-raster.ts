import type { CellValues } from '#sim-core/grid/ground.ts';
import { mapValues } from '#sim-core/grid/map-values.ts';

/** One row of a class table, as far as a map needs it. */
export interface MapClass {
  readonly value: number;
  readonly name: string;
  /** `#rrggbb` */
  readonly colour: string;
}

/**
 * What a map can be coloured by; row-major from the north-west, one value a cell.
 * A new raster is a new `values` array: a map looks at its identity, not at its contents.
 */
export type MapRaster =
  /** round(255·C) */
  | { readonly kind: 'cover'; readonly values: Uint8Array }
  /** round(255·share) of something else, such as capacity or refuge; `most`: what 255 stands for, where that is no share of 1 */
  | {
      readonly kind: 'share';
      readonly values: Uint8Array;
      readonly name: string;
      readonly most?: { readonly value: number; readonly unit: string };
    }
  /** heights in equal steps: 1 to 255 from the lowest to the highest, m; 0 no data */
  | {
      readonly kind: 'height';
      readonly values: Uint8Array;
      readonly lowest: number;
      readonly highest: number;
    }
  /** shares less those of something else: 128 alike, 1 all less, 255 all more */
  | { readonly kind: 'difference'; readonly values: Uint8Array; readonly name: string }
  /** closing years: 0 still open at the horizon, -32768 cannot hold the plant; the survey year: stood at the survey */
  | {
      readonly kind: 'closing';
      readonly values: Int16Array;
      readonly surveyYear: number;
      readonly lastYear: number;
      /** the same as they go to the graphics card (`toTexels`), where a worker made them */
      readonly texels?: Uint8Array;
    }
  | {
      readonly kind: 'classes';
      readonly values: CellValues;
      readonly classes: readonly MapClass[];
      readonly noData?: number | null;
    };

/** Codes of a closing-year texture; years follow from `closingFirst` on. */
export const closingCode = { noData: 0, open: 1, standing: 2, first: 3 } as const;
export const noClassCode = 255;
const noClosing = -32768;

/** Texture code of a closing year: one code a year as long as 253 are enough, evenly shared beyond. */
export function closingTexel(year: number, surveyYear: number, lastYear: number): number {
  if (year === noClosing) return closingCode.noData;
  if (year === 0) return closingCode.open;
  if (year <= surveyYear) return closingCode.standing;
  const codes = 256 - closingCode.first;
  const years = Math.max(1, lastYear - surveyYear);
  const place = Math.min(years, year - surveyYear) - 1;
  return closingCode.first + (years <= codes ? place : Math.floor((place * codes) / years));
}

/**
 * One byte a cell, as it goes to the graphics card. Shares are that already and come back as they are, uncopied.
 * @throws RangeError when a class table has more rows than a byte can tell apart
 */
export function toTexels(raster: MapRaster): Uint8Array {
  if (raster.kind !== 'closing' && raster.kind !== 'classes') return raster.values;
  if (raster.kind === 'closing' && raster.texels) return raster.texels;
  const texels = new Uint8Array(raster.values.length);
  if (raster.kind === 'closing') {
    const { values, surveyYear, lastYear } = raster;
    return mapValues(values, texels, (year) => closingTexel(year, surveyYear, lastYear));
  }
  const { values, classes, noData } = raster;
  if (classes.length > noClassCode)
    throw new RangeError(`Found ${classes.length} classes; a map shows at most ${noClassCode}. Merge some.`);
  const codes = new Map(classes.map((c, i) => [c.value, i]));
  if (typeof noData === 'number') codes.delete(noData);
  return mapValues(values, texels, (value) => codes.get(value) ?? noClassCode);
}

/** Whether `toTexels` gives the same for both, so that a class's new name or colour costs no look at the cells. */
export function sameTexels(a: MapRaster, b: MapRaster): boolean {
  if (a.values !== b.values) return false;
  if (a.kind === 'closing' && b.kind === 'closing')
    return a.surveyYear === b.surveyYear && a.lastYear === b.lastYear;
  if (a.kind === 'classes' && b.kind === 'classes')
    return (
      a.noData === b.noData &&
      a.classes.length === b.classes.length &&
      a.classes.every(({ value }, i) => value === b.classes[i].value)
    );
  return a.kind !== 'classes' && b.kind !== 'classes';
}

/** To the centimetre: steps are finer than that on a site of less than 2.5 m from lowest to highest. */
const heightOf = ({ lowest, highest }: { lowest: number; highest: number }, byte: number) =>
  (lowest + ((byte - 1) / 254) * (highest - lowest)).toFixed(2);

const percent = (byte: number) => `${Math.round((byte / 255) * 100)} %`;

/** A share in per cent, or in the unit of what it is a share of. */
export const shareOf = (
  { most }: Pick<Extract<MapRaster, { kind: 'share' }>, 'most'>,
  byte: number,
): string => (most ? `${Number(((most.value * byte) / 255).toPrecision(2))} ${most.unit}` : percent(byte));

/** Percentage points of a difference, with its sign. */
function points(byte: number): string {
  const difference = Math.round((byte - 128) / 1.27);
  return difference === 0 ? 'alike' : `${difference > 0 ? '+' : '−'}${Math.abs(difference)} points`;
}

/** One cell in words. `capacity` is the ground's, where it is known: 0 cannot hold the plant. */
export function describeCell(
  raster: MapRaster | undefined,
  capacity: Uint8Array | undefined,
  cell: number,
): string {
  if (capacity?.[cell] === 0 && raster?.kind !== 'classes' && raster?.kind !== 'height')
    return 'cannot hold the plant';
  if (!raster) return '';
  const value = raster.values[cell];
  switch (raster.kind) {
    case 'cover':
      return `cover ${percent(value)}`;
    case 'share':
      return `${raster.name} ${shareOf(raster, value)}`;
    case 'height':
      return value === 0 ? 'no data' : `about ${heightOf(raster, value)} m`;
    case 'difference':
      return `${raster.name} ${points(value)}`;
    case 'closing':
      if (value === noClosing) return 'cannot hold the plant';
      if (value === 0) return `still open in ${raster.lastYear}`;
      return value <= raster.surveyYear ? 'stood at the survey' : `closes in ${value}`;
    case 'classes': {
      if (Number.isNaN(value) || value === raster.noData) return 'no data';
      return raster.classes.find((c) => c.value === value)?.name ?? `class ${value}, not in the table`;
    }
  }
}
