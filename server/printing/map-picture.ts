import { encode } from 'fast-png';
import { cannotClose, stillOpen } from '#sim-core/index.ts';
import { closingColour, printColours, rgbOf, type Rgb } from './print-colours.ts';

export interface MapPictureInput {
  readonly width: number;
  readonly height: number;
  /** median closing years: 0 open at the horizon in most futures, −32768 cannot hold the plant */
  readonly closing: Int16Array;
  readonly surveyYear: number;
  readonly years: number;
  /** pixels of the longer side, at most; a larger map is drawn of every n-th cell */
  readonly longest: number;
}

/** Ground that stays open is drawn on this, with hatching in `late`. */
const openGround: Rgb = [238, 241, 241];
const hatchEvery = 6;

/**
 * The closing years as a PNG whose cells are whole pixels, so that it stays sharp however large it is drawn. What stays
 * open is hatched.
 */
export function mapPicture(input: MapPictureInput): Uint8Array {
  const { width, height, closing, surveyYear, years, longest } = input;
  const side = Math.max(width, height);
  const every = Math.ceil(side / longest);
  const grow = Math.max(1, Math.floor(longest / side));
  const columns = Math.ceil(width / every);
  const rows = Math.ceil(height / every);
  const colours = new Map<number, Rgb>([
    [cannotClose, rgbOf(printColours.water)],
    [surveyYear, rgbOf(printColours.standing)],
  ]);
  const colourOf = (year: number): Rgb => {
    const known = colours.get(year);
    if (known) return known;
    const made = year <= surveyYear ? rgbOf(printColours.standing) : closingColour(year, surveyYear, years);
    colours.set(year, made);
    return made;
  };
  const late = rgbOf(printColours.late);
  const data = new Uint8Array(columns * grow * rows * grow * 3);
  for (let y = 0; y < rows * grow; y++) {
    const row = Math.floor(y / grow) * every * width;
    for (let x = 0; x < columns * grow; x++) {
      const year = closing[row + Math.floor(x / grow) * every];
      const open = year === stillOpen;
      const colour = open ? ((x + y) % hatchEvery === 0 ? late : openGround) : colourOf(year);
      data.set(colour, 3 * (y * columns * grow + x));
    }
  }
  return encode({ width: columns * grow, height: rows * grow, data, channels: 3, depth: 8 });
}
