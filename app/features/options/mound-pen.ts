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
}
export type MoundField = keyof MoundPen;
export type MoundErrors = Partial<Record<MoundField, string>>;
export type PenMound = Pick<Mound, MoundField>;

export const startingMound: MoundPen = { radius: '1.5', strength: '100', halo: '1' };

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
  const mound = { radius: read('radius'), strength: read('strength'), halo: read('halo') };
  return Object.keys(errors).length > 0 ? { errors } : { mound };
}
