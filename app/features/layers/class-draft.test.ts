import { expect, it } from 'vitest';
import { classesForMap, readRows, rowErrors, startRows } from './class-draft.ts';

const layer = {
  classCounts: [
    { value: 1, cells: 5 },
    { value: 2, cells: 7 },
  ],
  classes: [{ value: 2, name: 'Marsh', colour: '#5b825a', capacity: 0.9, vigour: 1 }],
};

it('starts with what was saved and a row for every class that was not', () => {
  expect(startRows(layer)).toMatchObject([
    { value: 1, name: 'Class 1', capacity: '1' },
    { value: 2, name: 'Marsh', capacity: '0.9' },
  ]);
});

it('reads shares with a decimal comma, and says what is wrong at the field', () => {
  const [first, second] = startRows(layer);
  expect(readRows([{ ...first, capacity: '0,5' }, second])).toMatchObject([
    { capacity: 0.5 },
    layer.classes[0],
  ]);
  const wrong = { ...first, name: ' ', capacity: '1.2', vigour: ' ' };
  expect(rowErrors(wrong)).toEqual({
    name: 'Give this class a name',
    capacity: 'Capacity: found “1.2”, expected a share from 0 to 1',
    vigour: 'Vigour: found nothing, expected a share from 0 to 1',
  });
  expect(readRows([wrong, second])).toBeUndefined();
  expect(classesForMap([wrong])[0]).toMatchObject({ capacity: 1, vigour: 0 });
  expect(rowErrors(second)).toEqual({});
});
