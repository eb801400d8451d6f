import { describe, expect, it } from 'vitest';
import { strFromU8, strToU8, unzipSync, zipSync } from 'fflate';
import { decodeCellValues, encodeCellValues } from '../cells/cell-values.ts';
import { createEnsembleMaps, mapNames } from './ensemble-maps.ts';

const input = { width: 4, height: 1, years: [2030, 2040] };
/** Closes early, late, never, and a cell that cannot hold the plant. */
const replicates = [
  { closing: [2028, 2040, 0, -32768], frames: [51, 255] },
  { closing: [2030, 0, 0, -32768], frames: [102, 204] },
  { closing: [2035, 2033, 0, -32768], frames: [153, 102] },
];
type Maps = ReturnType<typeof createEnsembleMaps>;
const add = (maps: Maps, number: number) => {
  const { closing, frames } = replicates[number];
  maps.add(
    number,
    Int16Array.from(closing),
    new Map(input.years.map((year, y) => [year, new Uint8Array(4).fill(frames[y])])),
  );
};
const allMaps = (maps: Maps) => mapNames(input.years).map((name) => maps.map(name));

describe('the maps of an ensemble', () => {
  it('are the median closing year, the chance of having closed and the mean cover', () => {
    const maps = createEnsembleMaps(input);
    for (const number of [0, 1, 2]) add(maps, number);
    expect([...maps.map('closing')]).toEqual([2030, 2040, 0, -32768]);
    // Two of three by 2030, all by 2040; where nothing can grow there is no chance.
    expect([...maps.map('chance-2030')]).toEqual([170, 0, 0, 0]);
    expect([...maps.map('chance-2040')]).toEqual([255, 170, 0, 0]);
    expect(maps.map('cover-2030')[0]).toBe(102);
    expect(maps.map('cover-2040')[0]).toBe(187);
    expect(() => maps.map('cover-2031')).toThrow('No map of 2031');
  });

  it('are the same in any order, with a replicate that comes twice, and when they go on from a stored state', () => {
    const straight = createEnsembleMaps(input);
    for (const number of [0, 1, 2]) add(straight, number);
    const begun = createEnsembleMaps(input);
    for (const number of [2, 0, 2]) add(begun, number);
    const resumed = createEnsembleMaps(input, begun.state());
    expect(resumed.replicates()).toEqual([0, 2]);
    for (const number of [0, 1]) add(resumed, number);
    expect(resumed.replicates()).toEqual([0, 1, 2]);
    expect(allMaps(resumed)).toEqual(allMaps(straight));
  });

  it('go on from a state of version 1, whose sums are of 32 bits', () => {
    const begun = createEnsembleMaps(input);
    for (const number of [0, 1]) add(begun, number);
    const files = unzipSync(begun.state());
    for (const year of input.years) {
      const { values, ...size } = decodeCellValues(files[`cover-${year}`]);
      expect(values).toBeInstanceOf(Uint16Array);
      files[`cover-${year}`] = new Uint8Array(
        encodeCellValues({ ...size, values: Uint32Array.from(values) }),
      );
    }
    files['state.json'] = strToU8(strFromU8(files['state.json']).replace('"version":2', '"version":1'));
    const resumed = createEnsembleMaps(input, zipSync(files));
    add(resumed, 2);
    const straight = createEnsembleMaps(input);
    for (const number of [0, 1, 2]) add(straight, number);
    expect(allMaps(resumed)).toEqual(allMaps(straight));
  });

  it('take in nothing of a replicate that lacks a kept year', () => {
    const maps = createEnsembleMaps(input);
    const frames = new Map([[2030, new Uint8Array(4)]]);
    expect(() => maps.add(0, new Int16Array(4), frames)).toThrow('The cover of 2040 was not kept.');
    for (const number of [0, 1, 2]) add(maps, number);
    expect(maps.map('chance-2040')[0]).toBe(255);
  });

  it('refuse the state of another map, and a damaged one', () => {
    const state = createEnsembleMaps(input).state();
    expect(() => createEnsembleMaps({ ...input, years: [2030, 2041] }, state)).toThrow(
      /years 2030, 2040; expected .* 2030, 2041/,
    );
    expect(() => createEnsembleMaps(input, state.slice(0, 40))).toThrow();
  });
});
