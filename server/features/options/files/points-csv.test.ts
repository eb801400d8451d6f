import { expect, it } from 'vitest';
import type { Work } from '#contract/works.ts';
import { isPoints, pointsCsv } from './points-csv.ts';
import { readPointsCsv } from './read-points-csv.ts';

const site = { width: 600, height: 400, cellSize: 2, originX: 412_200, originY: 5_301_900, epsg: 32631 };
const disc = { shape: 'disc', x: 412_500.125, y: 5_301_600, radius: 12 } as const;
const works: Work[] = [
  { id: 'a', kind: 'mound', year: 2027, x: 412_203.5, y: 5_301_890, radius: 1.5, strength: 0.8, halo: 1, name: '-North, "old"' },
  { id: 'b', kind: 'planting', year: 2028, area: disc, cover: 0.4 },
  { id: 'c', kind: 'clumps', year: 2027, points: [[412_400, 5_301_700]], each: 6 },
  { id: 'd', kind: 'fence', year: 2027, until: 2030, area: disc, strength: 1 },
  { id: 'e', kind: 'loss', year: 2029, area: disc, share: 0.25 },
]; // prettier-ignore
const read = (content: string) => readPointsCsv(content, site, 2027).found;
const withoutIds = (list: readonly Work[]) => list.map((work) => ({ ...work, id: '' }));

it('points come back as they were', () => {
  const text = pointsCsv(works);
  expect(text.split('\r\n')[1]).toBe(`mound,"'-North, ""old""",412203.5,5301890,2027,,1.5,0.8,1,,,`);
  const found = read(text);
  expect(found.problems).toEqual([]);
  expect(withoutIds(found.works)).toEqual(withoutIds(works));
});

it('leaves outlines out, and sets of clumps come as one row a point', () => {
  const ring: [number, number][] = [[412_300, 5_301_800], [412_320, 5_301_800], [412_310, 5_301_820]]; // prettier-ignore
  const outline: Work = { id: 'o', kind: 'fence', year: 2027, area: { shape: 'polygon', ring }, strength: 1 };
  const clumps: Work = { id: 'c', kind: 'clumps', year: 2027, points: ring, each: 2 };
  expect([outline, clumps].map(isPoints)).toEqual([false, true]);
  expect(read(pointsCsv([outline, clumps])).works).toMatchObject([
    { kind: 'clumps', points: [ring[0]], each: 2 },
    { kind: 'clumps', points: [ring[1]], each: 2 },
    { kind: 'clumps', points: [ring[2]], each: 2 },
  ]);
});

it('takes coordinates alone, by any usual name, in metres or degrees, with decimal commas', () => {
  const usual = { kind: 'mound', radius: 1.5, strength: 1, halo: 0, year: 2027 };
  for (const text of ['Easting (m);Northing (m)\n412203,5;5301890', 'y_m\tx_m\n5301890\t412203.5'])
    expect(read(text).works).toMatchObject([{ ...usual, x: 412_203.5, y: 5_301_890 }]);
  const [work] = read('Longitude,Latitude,what,clumps\n1.8263,47.8607,clumps,3').works;
  expect(work).toMatchObject({ kind: 'clumps', each: 3 });
});

it('says line by line what is wrong, and keeps the rest', () => {
  const text = [
    'kind,x,y,year,radius,colour',
    'mound,412203,5301890,2027,1.5,red',
    'mound,412203,,2027,1.5,',
    '',
    'mound,412 203,5301890,2027,1.5,',
    'dam,412203,5301890,2027,1.5,',
    'mound,1,5301890,2027,1.5,',
    'mound,412203,5301890,soon,0,',
    'mound,412203,5301890,2027,0,',
    'planting,412203,5301890,2027,2,',
  ].join('\n');
  const found = read(text);
  expect(found.works).toHaveLength(1);
  expect(found.problems).toMatchObject([
    { row: null, message: 'Columns that mean nothing here were left out: colour.' },
    { row: 3, message: 'Line 3: y is empty.' },
    { row: 5, message: 'Line 5: x is “412 203”, which is no number.' },
    { row: 6, message: expect.stringMatching(/^Line 6: .*kind/) as string },
    { row: 7, message: 'Line 7: Easting 1 lies off the site; expected 412200 to 413400' },
    { row: 8, message: 'Line 8: year is “soon”, which is no number.' },
    { row: 9, message: expect.stringMatching(/^Line 9: radius/) as string },
    { row: 10, message: expect.stringMatching(/^Line 10: cover/) as string },
  ]);
});

it.each([
  ['', /The file is empty/],
  ['kind,year\nmound,2027', /Found the columns kind, year; expected x and y/],
])('is refused as a whole without coordinates', (text, message) => {
  expect(() => read(text)).toThrow(message);
});

it('counts the problems that it does not list', () => {
  const found = read(`x,y\n${'1,1\n'.repeat(250)}`);
  expect([found.problems.length, found.moreProblems]).toEqual([200, 50]);
});
