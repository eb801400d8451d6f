import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { parameters, type Parameter } from './parameters.ts';
import { fragmentParameters, grazerParameters } from './process-parameters.ts';

const page = readFileSync(join(import.meta.dirname, '../../docs/run-spec.md'), 'utf8');
/** Cells of the page's rate table, by name. */
const rows = new Map(
  page
    .split('\n')
    .filter((line) => line.startsWith('| `'))
    .map((line) => line.split('|').map((cell) => cell.trim()))
    .map(([, name, ...cells]) => [name.replaceAll('`', ''), cells]),
);

const all = Object.entries<Parameter>({ ...parameters, ...grazerParameters, ...fragmentParameters });

describe('the table of rates', () => {
  it.each(all)('%s stands on the documented page as it is', (name, parameter) => {
    const { symbol, unit, default: start, min, max, meaning, source } = parameter;
    const cells = rows.get(name)?.slice(0, 6);
    const plain = (text: string) => text.replaceAll('\\', '');
    expect(cells?.map(plain)).toEqual([symbol, unit, String(start), `${min} to ${max}`, meaning, source]);
  });

  it.each(all)('%s starts within its range', (_, { default: start, min, max }) => {
    expect(start).toBeGreaterThanOrEqual(min);
    expect(start).toBeLessThanOrEqual(max);
  });
});
