import type { Mound } from '#sim-core/spec/run-spec.ts';
import { parseNumber } from '#app/lib/parse-number.ts';

/** What a click places, as it is typed in the sentence above the map. */
export interface MoundPen {
  /** m */
  readonly radius: string;
  /** per cent of full strength */
  readonly strength: string;
  /** m over which it fades out beyond the radius */
  readonly halo: string;
  readonly year: string;
}
export type PenField = keyof MoundPen;
export type PenErrors = Partial<Record<PenField, string>>;
export type PenMound = Omit<Mound, 'kind' | 'x' | 'y'>;

/** The pen that a page starts with: works in the first year that can be simulated. */
export const startingPen = (surveyYear: number): MoundPen => ({
  radius: '1.5',
  strength: '100',
  halo: '1',
  year: String(surveyYear + 1),
});

/** The mound that the sentence describes, or what is wrong with each blank. */
export function readPen(
  pen: MoundPen,
  { surveyYear, years }: { surveyYear: number; years: number },
): { mound: PenMound; errors?: undefined } | { mound?: undefined; errors: PenErrors } {
  const errors: PenErrors = {};
  const read = (field: PenField, fits: (value: number) => boolean, message: string): number => {
    const value = parseNumber(pen[field]);
    if (value !== undefined && fits(value)) return value;
    errors[field] = message;
    return 0;
  };
  const radius = read('radius', (m) => m > 0 && m <= 1000, 'The radius must lie above 0 and up to 1000 m.');
  const strength = read(
    'strength',
    (p) => p > 0 && p <= 100,
    'The strength must lie above 0 and up to 100 %.',
  );
  const halo = read('halo', (m) => m >= 0 && m <= 1000, 'It can fade over 0 to 1000 m.');
  const year = read(
    'year',
    (y) => Number.isInteger(y) && y > surveyYear && y <= surveyYear + years,
    `The year must be one from ${surveyYear + 1} to ${surveyYear + years}, the years of the outlook.`,
  );
  return Object.keys(errors).length > 0
    ? { errors }
    : { mound: { radius, strength: strength / 100, halo, year } };
}
