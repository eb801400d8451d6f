import type { FieldNumbers } from '#contract/plants.ts';
import { parseNumber } from '#app/lib/parse-number.ts';

type FieldName = keyof FieldNumbers;
/** What was measured in the field, as typed; nothing typed is nothing measured. */
export type FieldNumbersDraft = Readonly<Record<FieldName, { value: string; plusMinus: string }>>;

export const fieldNumberWords: Readonly<Record<FieldName, { label: string; unit: string }>> = {
  frontSpeed: { label: 'A straight edge advanced by', unit: 'm/yr' },
  yearsToHalf: { label: 'From 1 % cover to half full took', unit: 'years' },
};
const names = Object.keys(fieldNumberWords) as FieldName[];

export const startFieldNumbers = (numbers: FieldNumbers): FieldNumbersDraft =>
  Object.fromEntries(
    names.map((name) => {
      const known = numbers[name];
      return [
        name,
        { value: known ? String(known.value) : '', plusMinus: known ? String(known.plusMinus) : '' },
      ];
    }),
  ) as FieldNumbersDraft;

const isEmpty = ({ value, plusMinus }: FieldNumbersDraft[FieldName]) =>
  value.trim() === '' && plusMinus.trim() === '';

/** What is wrong, by measurement. */
export function fieldNumberErrors(draft: FieldNumbersDraft): { [name in FieldName]?: string } {
  return Object.fromEntries(
    names.flatMap((name) => {
      if (isEmpty(draft[name])) return [];
      const { value, plusMinus } = draft[name];
      const [number, around] = [parseNumber(value), plusMinus.trim() === '' ? 0 : parseNumber(plusMinus)];
      if (number === undefined || !(number > 0) || number > 1e4)
        return [[name, `Found “${value.trim()}”; a number above 0 is expected.`]];
      if (around === undefined || around < 0 || around > 1e4)
        return [[name, `Found “± ${plusMinus.trim()}”; 0 or more is expected.`]];
      return [];
    }),
  );
}

/** The measurements that make sense. */
export const fieldNumbersOf = (draft: FieldNumbersDraft): FieldNumbers => {
  const errors = fieldNumberErrors(draft);
  return Object.fromEntries(
    names.flatMap((name) =>
      isEmpty(draft[name]) || errors[name]
        ? []
        : [
            [
              name,
              { value: parseNumber(draft[name].value)!, plusMinus: parseNumber(draft[name].plusMinus) ?? 0 },
            ],
          ],
    ),
  );
};
