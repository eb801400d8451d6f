// @vitest-environment node
import { expect, it } from 'vitest';
import { comparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { portWorker } from '#app/workers/testing/port-worker.ts';
import { figuresBook } from './figures-book.ts';
import { createFiguresDesk } from './figures-desk.ts';
import { smallComparison } from './testing/small-comparison.ts';

const comparison = smallComparison(6);
const record = (replicate: number, recoveredYear: number | null): ReplicateRecord => ({
  replicate,
  digest: String(replicate).padStart(64, '0'),
  recoveredYear,
  lostYear: null,
  droughtYear: 2026,
  coveredArea: Array.from({ length: 13 }, (_, i) => i),
  droughtIndex: new Array<number>(12).fill(0),
  lost: { drought: 1, background: 0, grazing: 0, events: 0 },
  drawn: {},
});

it('tells the worker each record once, and figures are those of all records', async () => {
  const taken: number[] = [];
  const book = figuresBook();
  const face = {
    ...book,
    take: (...[option, outlook, records]: Parameters<typeof book.take>) => {
      taken.push(...records.map(({ replicate }) => replicate));
      book.take(option, outlook, records);
    },
  };
  const desk = createFiguresDesk(() => portWorker(face).worker);
  const known = comparison.plan.options.map(() => [new Map<number, ReplicateRecord>()]);
  const fill = (replicate: number) =>
    known.forEach(([records], option) =>
      records.set(replicate, record(replicate, 2024 + replicate - option)),
    );
  const same = async () =>
    expect(await desk.figures(comparison, known)).toEqual(
      comparisonFigures(comparison.plan, known, comparison.id),
    );
  fill(2);
  fill(0);
  await same();
  fill(1);
  await same();
  expect(taken.toSorted()).toEqual([0, 0, 1, 1, 2, 2]);
  // Other records, as when a page reads what is stored: nothing of the old ones is left.
  const other = comparison.plan.options.map(() => [
    new Map([
      [3, record(3, null)],
      [4, record(4, 2025)],
    ]),
  ]);
  expect(await desk.figures(comparison, other)).toEqual(
    comparisonFigures(comparison.plan, other, comparison.id),
  );
  expect(await desk.mayStop(comparison, other)).toBeUndefined();
  desk.close();
});
