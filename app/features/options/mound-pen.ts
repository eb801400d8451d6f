import type { Mound } from '#sim-core/spec/run-spec.ts';
import { parseNumber } from '#app/lib/parse-number.ts';

/** What a mound is, as it is typed in the sentence above the map; its year is that of all works. */
export interface MoundPen {
  /** m */
  readonly radius: string;
  /** per cent of full strength */
  readonly strength: string;
  /** m over which it fades out beyond the radius */
  readonly halo: string;
  /** set on it */
  readonly clumps: string;
}
export type MoundField = Exclude<keyof MoundPen, 'clumps'>;
export type MoundErrors = Partial<Record<keyof MoundPen, string>>;
export type PenMound = Pick<Mound, MoundField> & { readonly clumps: number };

export const startingMound: MoundPen = { radius: '1.5', strength: '100', halo: '1', clumps: '9' };
/** Most clumps that are set at one point. */
const mostClumps = 100_000;

/** One field of a mound as it is typed, or what is wrong with it. */
export function readMoundField(field: MoundField, text: string): number | string {
  const value = parseNumber(text);
  switch (field) {
    case 'radius':
      return value !== undefined && value > 0 && value <= 1000
        ? value
        : 'The radius must lie above 0 and up to 1000 m.';
    case 'strength':
      return value !== undefined && value > 0 && value <= 100
        ? value / 100
        : 'The strength must lie above 0 and up to 100 %.';
    case 'halo':
      return value !== undefined && value >= 0 && value <= 1000 ? value : 'It can fade over 0 to 1000 m.';
  }
}

/** The mound that the sentence describes, or what is wrong with each blank. */
export function readMound(
  pen: MoundPen,
): { mound: PenMound; errors?: undefined } | { mound?: undefined; errors: MoundErrors } {
  const errors: MoundErrors = {};
  const read = (field: MoundField): number => {
    const value = readMoundField(field, pen[field]);
    if (typeof value === 'number') return value;
    errors[field] = value;
    return 0;
  };
  const clumps = parseNumber(pen.clumps) ?? -1;
  if (!Number.isInteger(clumps) || clumps < 0 || clumps > mostClumps)
    errors.clumps = 'The clumps on a mound must be a whole number from 0 to 100,000.';
  const mound = { radius: read('radius'), strength: read('strength'), halo: read('halo'), clumps };
  return Object.keys(errors).length > 0 ? { errors } : { mound };
}
