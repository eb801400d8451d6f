import { readFileSync } from 'node:fs';
import { decode } from 'fast-png';
import { describe, expect, it } from 'vitest';
import { rowsOf } from './pdf/brief-page.ts';
import { niceLength } from './pdf/small-maps.ts';
import { linesOf } from './pdf/words.ts';
import { mapPicture } from './map-picture.ts';
import { outlookInWords } from './odd/outlook-words.ts';
import { sourceInWords } from './odd/source-words.ts';
import { closingColour, closingRamp, printColours, rgbOf } from './print-colours.ts';

it('prints in the colours of the light theme', () => {
  const theme = readFileSync(new URL('../../app/theme.css', import.meta.url), 'utf8');
  const light = theme.slice(0, theme.indexOf('@layer theme'));
  for (const [name, colour] of Object.entries(printColours))
    expect(light).toContain(`--color-${name}: ${colour};`);
  closingRamp.forEach((colour, i) => expect(light).toContain(`--color-closing-${i}: ${colour};`));
});

describe('a map picture', () => {
  const input = { width: 4, height: 2, surveyYear: 2026, years: 10, longest: 12 };
  const closing = Int16Array.of(-32768, 2026, 2027, 2036, 0, 0, 0, 0);
  const pixel = (png: Uint8Array, x: number, y: number) => {
    const { width, data } = decode(png);
    return [...data.subarray(3 * (y * width + x), 3 * (y * width + x) + 3)];
  };
  it('gives every cell whole pixels in its own colour', () => {
    const png = mapPicture({ ...input, closing });
    expect(decode(png)).toMatchObject({ width: 12, height: 6, channels: 3 });
    const colours = [printColours.water, printColours.standing, closingRamp[0], closingRamp[8]].map(rgbOf);
    colours.forEach((colour, cell) => {
      for (const [dx, dy] of [
        [0, 0],
        [2, 2],
      ])
        expect(pixel(png, 3 * cell + dx, dy)).toEqual([...colour]);
    });
  });
  it('hatches what stays open', () => {
    const png = mapPicture({ ...input, closing });
    const row = Array.from({ length: 12 }, (_, x) => pixel(png, x, 4).join());
    expect(new Set(row)).toEqual(new Set([rgbOf(printColours.late).join(), '238,241,241']));
  });
  it('takes every n-th cell of a map that is too large', () => {
    const wide = { ...input, width: 100, height: 50, closing: new Int16Array(5000).fill(2027), longest: 30 };
    expect(decode(mapPicture(wide))).toMatchObject({ width: 25, height: 13 });
  });
  it('goes the ramp from the first year to the horizon', () => {
    expect(closingColour(2027, 2026, 10)).toEqual(rgbOf(closingRamp[0]));
    expect(closingColour(2036, 2026, 10)).toEqual(rgbOf(closingRamp[8]));
    expect(closingColour(2027, 2026, 1)).toEqual(rgbOf(closingRamp[0]));
  });
});

describe('words on paper', () => {
  it('begin an item with a hyphen', () => {
    expect(linesOf('One.\n\n- two\n– three\nfour-five')).toEqual([
      { item: false, text: 'One.' },
      { item: true, text: 'two' },
      { item: true, text: 'three' },
      { item: false, text: 'four-five' },
    ]);
  });
  it('stand side by side where parts are narrow and follow each other', () => {
    const of = (...parts: string[]) =>
      rowsOf(parts.map((part) => ({ part, heading: '', words: '', shown: part !== 'change' }) as never)).map(
        (row) => row.map(({ part }) => part),
      );
    expect(of('question', 'cost', 'sureness', 'decision', 'answer', 'cautions')).toEqual([
      ['question'],
      ['cost', 'sureness'],
      ['decision'],
      ['answer'],
      ['cautions'],
    ]);
    expect(of('cost', 'change', 'sureness')).toEqual([['cost', 'sureness']]);
  });
  it.each([
    [213, 200],
    [499, 200],
    [500, 500],
    [1.5, 1],
    [0.7, 0.5],
  ])('a scale of at most %d m is %d m long', (room, length) =>
    expect(niceLength(room)).toBeCloseTo(length, 9),
  );
});

describe('the inputs of a run in words', () => {
  it('tell an outlook with all that it brings', () => {
    const words = outlookInWords(
      {
        droughtIndex: {
          kind: 'renewal',
          returnInterval: { law: 'weibull', shape: 2, scale: 12 },
          sinceLatest: 1,
          depth: -3,
          length: { law: 'fixed', years: 2 },
        },
        trend: { shiftPerDecade: -0.2, frequencyPerDecade: 1.1 },
        losses: [{ chance: 0.05, share: 0.3 }],
        grazing: false,
      },
      2026,
    );
    expect(words).toMatch(
      /a Weibull time of shape 2 and scale 12 years, the latest 1 year before the end of 2026/,
    );
    expect(words).toMatch(
      /the index moves by −0.2 \(drier\) and every decade droughts begin 1.1 times as often/,
    );
    expect(words).toMatch(
      /a loss of 30 % of the cover in any year with a chance of 5 % a year \(20 years apart/,
    );
    expect(words).toMatch(/Grazers stay away\.$/);
  });
  it('tell where ground comes from', () => {
    const name = (hash: string) => `${hash[0]}.tif`;
    expect(
      sourceInWords(
        {
          product: [
            { layer: 'a'.repeat(64), classes: { 1: 0, 2: 1 } },
            { highest: [0.5, { layer: 'b'.repeat(64) }] },
          ],
        },
        name,
      ),
    ).toBe('the product of a.tif by a table of 2 classes and the highest of 0.5 everywhere and b.tif');
  });
});
