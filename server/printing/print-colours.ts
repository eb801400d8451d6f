/** The colours of paper: those of the light theme (`app/theme.css`), which a test holds them to. */
export const printColours = {
  paper: '#fafbfb',
  ink: '#13262d',
  'ink-2': '#44575e',
  rule: '#b4c0c3',
  'rule-2': '#ced7d9',
  water: '#b7c4ce',
  standing: '#dce2dc',
  flag: '#ff5a36',
  late: '#141c33',
} as const;

/** The ramp of closing years, soon to late. */
export const closingRamp = [
  '#cce09f',
  '#a3cf9b',
  '#78be96',
  '#58a79e',
  '#368ea2',
  '#347296',
  '#315488',
  '#2c386a',
  '#241e4d',
] as const;

export type Rgb = readonly [number, number, number];
export const rgbOf = (hex: string): Rgb =>
  [1, 3, 5].map((at) => parseInt(hex.slice(at, at + 2), 16)) as unknown as Rgb;

/** The colour of a closing year; the first simulated year begins the ramp and the horizon ends it. */
export function closingColour(year: number, surveyYear: number, years: number): Rgb {
  const place = years > 1 ? (Math.min(years, Math.max(1, year - surveyYear)) - 1) / (years - 1) : 0;
  const at = place * (closingRamp.length - 1);
  const low = Math.min(closingRamp.length - 2, Math.floor(at));
  const [from, to] = [rgbOf(closingRamp[low]), rgbOf(closingRamp[low + 1])];
  return from.map((value, i) => Math.round(value + (to[i] - value) * (at - low))) as unknown as Rgb;
}
