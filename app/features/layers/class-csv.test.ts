import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { HabitatClass } from '#contract/layers.ts';
import { classesToCsv, parseClassCsv } from './class-csv.ts';

const classes: HabitatClass[] = [
  { value: 1, name: 'Creek, "deep"', colour: '#8496a2', capacity: 0, vigour: 0 },
  { value: -3, name: 'Marsh', colour: '#5b825a', capacity: 0.85, vigour: 1 },
];

it('writes RFC 4180, and reads what it wrote', () => {
  expect(classesToCsv(classes)).toBe(
    'value,name,colour,capacity,vigour\r\n1,"Creek, ""deep""",#8496a2,0,0\r\n-3,Marsh,#5b825a,0.85,1\r\n',
  );
  const name = fc.string({ minLength: 1, maxLength: 80 }).filter((text) => text.trim() === text);
  fc.assert(
    fc.property(fc.uniqueArray(name, { minLength: 1, maxLength: 5 }), (names) => {
      const table = names.map((text, value) => ({ ...classes[0], value, name: text }));
      expect(parseClassCsv(classesToCsv(table))).toEqual({ ok: true, classes: table });
    }),
    { numRuns: 50 },
  );
});

it('takes semicolons with decimal commas, other orders of columns, and blank lines', () => {
  const text = '\uFEFFName;Value;Capacity;Vigour;Color\n\nMarsh;-3;0,85;1;#5b825a\n';
  expect(parseClassCsv(text)).toEqual({ ok: true, classes: [classes[1]] });
});

describe('names the row', () => {
  const of = (...rows: string[]) => parseClassCsv(['value,name,colour,capacity,vigour', ...rows].join('\n'));
  it.each<[string, ReturnType<typeof of>, number, RegExp]>([
    ['of a share that is none', of('1,a,#123456,1.5,1'), 2, /capacity: found “1\.5”, expected a share/],
    ['of a colour that is none', of('1,a,#123456,1,1', '2,b,green,1,1'), 3, /colour: found “green”/],
    ['of a class that stands there twice', of('1,a,#123456,1,1', '1,b,#123456,1,1'), 3, /row 2 already/],
    [
      'of a header that lacks a column',
      parseClassCsv('value,name\n1,a'),
      1,
      /Missing: colour, capacity, vigour/,
    ],
    ['of nothing', parseClassCsv('\n'), 0, /Found nothing/],
    ['of a header alone', of(), 0, /header row alone/],
    ['where a field is missing', of('1,a,#123456,1'), 2, /vigour: found “”/],
  ])('%s', (_, parsed, row, message) => {
    expect(parsed).toMatchObject({
      ok: false,
      problems: [{ row, message: expect.stringMatching(message) as string }],
    });
  });

  it('and counts what is too much to say', () => {
    const parsed = of(...Array.from({ length: 12 }, (_, i) => `${i},a,#123456,2,1`));
    expect(parsed.ok === false && parsed.problems.at(-1)).toEqual({
      row: 0,
      message: '4 more things are wrong',
    });
  });
});
