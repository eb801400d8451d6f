import { describe, expect, it } from 'vitest';
import { habitatClassesSchema } from '#contract/layers.ts';
import { suggestClasses } from './suggest-classes.ts';

const counts = (n: number) => Array.from({ length: n }, (_, i) => ({ value: i, cells: 10 }));
const channels = (hex: string) => [1, 3, 5].map((i) => parseInt(hex.slice(i, i + 2), 16));

describe('suggestClasses', () => {
  it('gives each of 256 classes a row that the server takes, in its own colour', () => {
    const rows = suggestClasses(counts(256));
    expect(habitatClassesSchema.safeParse(rows).success).toBe(true);
    expect(new Set(rows.map((row) => row.colour)).size).toBe(256);
  });

  it('keeps the colours muted and, for tables of usual length, well apart', () => {
    const colours = suggestClasses(counts(8)).map((row) => channels(row.colour));
    for (const c of colours) expect(Math.max(...c) - Math.min(...c)).toBeLessThan(90);
    for (const [i, a] of colours.entries())
      for (const b of colours.slice(0, i))
        expect(Math.hypot(...a.map((x, k) => x - b[k]))).toBeGreaterThan(30);
  });

  it('keeps what a table said before, and does not repeat its colours', () => {
    const marsh = { value: 1, name: 'Marsh', colour: '#8496A2', capacity: 0.9, vigour: 0.5 };
    const [first, second] = suggestClasses(counts(2), [marsh]);
    expect(second).toEqual(marsh);
    expect(first).toMatchObject({ value: 0, name: 'Class 0', capacity: 1, vigour: 1 });
    expect(first.colour).not.toBe('#8496a2');
  });
});
