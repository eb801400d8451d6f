import { closingCode, closingTexel, noClassCode, type MapClass, type MapRaster } from './map-raster.ts';

export type Rgb = readonly [number, number, number];

/** The colours of the theme that the map paints with, 0..255 each. */
export interface MapColours {
  readonly cover: readonly Rgb[];
  readonly closing: readonly Rgb[];
  readonly difference: readonly Rgb[];
  readonly water: Rgb;
  readonly shore: Rgb;
  readonly standing: Rgb;
  readonly late: Rgb;
  readonly flag: string;
  readonly ink: string;
  readonly halo: string;
}

/** `#rrggbb` or `#rgb` as three numbers. @throws Error when it is neither */
export function parseColour(text: string): Rgb {
  const hex = /^#([0-9a-f]{6}|[0-9a-f]{3})$/i.exec(text.trim())?.[1];
  if (!hex) throw new Error(`Found “${text}” where a colour such as #5b825a was expected`);
  const long = hex.length === 3 ? [...hex].map((c) => c + c).join('') : hex;
  return [0, 2, 4].map((i) => parseInt(long.slice(i, i + 2), 16)) as unknown as Rgb;
}

/** Reads the theme's colours as they hold at an element. */
export function readMapColours(element: Element): MapColours {
  const style = getComputedStyle(element);
  const text = (name: string) => style.getPropertyValue(`--color-${name}`).trim();
  const colour = (name: string) => parseColour(text(name));
  const ramp = (name: string) => Array.from({ length: 9 }, (_, i) => colour(`${name}-${i}`));
  return {
    cover: ramp('cover'),
    closing: ramp('closing'),
    difference: ramp('diff'),
    water: colour('water'),
    shore: colour('shore'),
    standing: colour('standing'),
    late: colour('late'),
    flag: text('flag'),
    ink: text('ink'),
    halo: text('halo'),
  };
}

/** Colour at `t` in 0..1 of evenly spaced stops. */
export function rampColour(stops: readonly Rgb[], t: number): Rgb {
  const place = Math.min(1, Math.max(0, t)) * (stops.length - 1);
  const below = Math.min(stops.length - 2, Math.floor(place));
  const share = place - below;
  return [0, 1, 2].map((k) =>
    Math.round(stops[below][k] + (stops[below + 1][k] - stops[below][k]) * share),
  ) as unknown as Rgb;
}

/** In the alpha of a palette: paint, hatch over the standing ground, or leave bare. */
export const paint = { solid: 255, hatched: 128, bare: 0 } as const;

/** What the colours of a raster follow from, besides the theme: not its values, so that frames share a palette. */
export interface MapScheme {
  readonly kind: MapRaster['kind'] | undefined;
  readonly surveyYear: number;
  readonly lastYear: number;
  readonly classes: readonly MapClass[];
}
const noClasses: readonly MapClass[] = [];
export const schemeOf = (raster: MapRaster | undefined): MapScheme => ({
  kind: raster?.kind,
  surveyYear: raster?.kind === 'closing' ? raster.surveyYear : 0,
  lastYear: raster?.kind === 'closing' ? raster.lastYear : 0,
  classes: raster?.kind === 'classes' ? raster.classes : noClasses,
});

/** 256 × RGBA: the colour of every texture code of a raster of this scheme. */
export function paletteOf(
  { kind, surveyYear, lastYear, classes }: MapScheme,
  colours: MapColours,
): Uint8Array {
  const palette = new Uint8Array(256 * 4);
  const set = (code: number, [r, g, b]: Rgb, alpha: number = paint.solid) => {
    palette.set([r, g, b, alpha], code * 4);
  };
  switch (kind) {
    case undefined:
      for (let code = 0; code < 256; code++) set(code, colours.standing);
      break;
    case 'cover':
    case 'share':
    case 'height':
      for (let code = 0; code < 256; code++) set(code, rampColour(colours.cover, code / 255));
      break;
    case 'difference':
      for (let code = 0; code < 256; code++) set(code, rampColour(colours.difference, (code - 1) / 254));
      break;
    case 'closing': {
      const years = lastYear - surveyYear;
      // Late years first: where several share a code, the first of them gives the colour.
      for (let n = years; n >= 1; n--)
        set(
          closingTexel(surveyYear + n, surveyYear, lastYear),
          rampColour(colours.closing, years > 1 ? (n - 1) / (years - 1) : 0),
        );
      set(closingCode.noData, colours.water);
      set(closingCode.open, colours.late, paint.hatched);
      set(closingCode.standing, colours.standing);
      break;
    }
    case 'classes':
      classes.forEach((c, i) => {
        set(i, parseColour(c.colour));
      });
      set(noClassCode, colours.standing, paint.bare);
  }
  return palette;
}
