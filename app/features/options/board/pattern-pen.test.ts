// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { penOf, penParameters, readPattern, startingPatterns, type PatternPen } from './pattern-pen.ts';
import type { PatternTool } from './board-tools.ts';

const setting = { unitCost: 1200, line: [] };
const read = (tool: PatternTool, more: Partial<PatternPen> = {}, unitCost: number | undefined = 1200) =>
  readPattern(tool, { ...startingPatterns[tool], ...more }, { ...setting, unitCost });

describe('a pattern', () => {
  it('reads as every sentence starts', () => {
    for (const tool of Object.keys(startingPatterns) as PatternTool[])
      expect(read(tool).errors, tool).toBeUndefined();
    expect(read('clumped').pattern).toEqual({
      kind: 'groups',
      each: 9,
      reach: 1,
      distance: 4,
      amount: { by: 'count', count: 200 },
    });
  });
  it('is scattered apart, or anywhere where no distance is asked for', () => {
    expect(read('scattered').pattern).toMatchObject({ kind: 'apart', distance: 12 });
    expect(read('scattered', { apart: '0' }).pattern).toMatchObject({ kind: 'scattered' });
    expect(read('scattered', { by: 'fit' }).pattern).toEqual({ kind: 'apart', distance: 12 });
    expect(read('scattered', { by: 'fit', apart: '0' }).errors?.apart).toContain('above 0');
  });
  it('takes a number, a density, a spacing or a budget', () => {
    expect(read('grid').pattern).toMatchObject({ amount: { by: 'spacing', spacing: 20 } });
    expect(read('grid', { by: 'density', perHectare: '25' }).pattern).toMatchObject({
      amount: { by: 'density', perHectare: 25 },
    });
    expect(read('edge', { by: 'budget', budget: '6000' }).pattern).toMatchObject({
      amount: { by: 'budget', budget: 6000, each: 1200 },
    });
    expect(
      readPattern('edge', { ...startingPatterns.edge, by: 'budget' }, { unitCost: undefined, line: [] })
        .errors?.budget,
    ).toContain('No cost is set');
  });
  it('says what is wrong with each blank', () => {
    expect(read('groups', { each: '0', reach: 'wide', count: '1.5' }).errors).toEqual({
      each: expect.stringContaining('whole number') as string,
      reach: expect.stringContaining('between 0.1') as string,
      count: expect.stringContaining('whole number') as string,
    });
  });
});

it('a pen is read back from what a set keeps of it, and from nothing else', () => {
  const pen = { ...startingPatterns.grid, angle: '30' };
  expect(penOf(penParameters('grid', pen))).toEqual({ tool: 'grid', pen });
  expect(penOf({ tool: 'grid', angle: 30 })?.pen).toEqual(startingPatterns.grid);
  expect(penOf({ tool: 'toString' })).toBeUndefined();
  expect(penOf({})).toBeUndefined();
});
