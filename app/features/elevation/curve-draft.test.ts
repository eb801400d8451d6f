import { describe, expect, it } from 'vitest';
import { editElevation, startEditing, type ElevationEvent } from './curve-draft.ts';

const start = startEditing({
  elevationCurves: {
    capacity: [
      [0, 0],
      [0.5, 1],
      [2, 0.2],
    ],
    vigour: null,
    exposure: null,
  },
  tidalDatums: [],
});
const after = (...events: ElevationEvent[]) => events.reduce(editElevation, start);
const capacity = (...events: ElevationEvent[]) => after(...events).draft.elevationCurves.capacity;
const move = (point: number, height: number, share: number, gesture?: string): ElevationEvent => ({
  type: 'moved',
  curve: 'capacity',
  point,
  height,
  share,
  gesture,
});

describe('a point', () => {
  it('moves to the centimetre and the hundredth, within 0 and 1, and never past its neighbours', () => {
    expect(capacity(move(1, 0.514, 0.456))?.[1]).toEqual([0.51, 0.46]);
    expect(capacity(move(1, 5, 3))?.[1]).toEqual([1.99, 1]);
    expect(capacity(move(1, -5, -3))?.[1]).toEqual([0.01, 0]);
    expect(capacity(move(2, 50, 0.5))?.[2]).toEqual([50, 0.5]);
  });

  it('is added in its place, and not where one stands', () => {
    const add = (height: number): ElevationEvent => ({
      type: 'added',
      curve: 'capacity',
      height,
      share: 0.7,
    });
    expect(capacity(add(1))?.map(([z]) => z)).toEqual([0, 0.5, 1, 2]);
    expect(after(add(0.5))).toBe(start);
    const full = Array.from({ length: 40 }, (_, i) => add(3 + i));
    expect(capacity(...full)).toHaveLength(20);
  });

  it('is removed, but for the last two', () => {
    const remove: ElevationEvent = { type: 'removed', curve: 'capacity', point: 0 };
    expect(capacity(remove)?.map(([z]) => z)).toEqual([0.5, 2]);
    expect(capacity(remove, remove)).toHaveLength(2);
  });
});

describe('what was done', () => {
  it('is taken back and done again, a drag in one', () => {
    const dragged = after(move(1, 0.6, 1, 'a'), move(1, 0.7, 0.9, 'a'), move(1, 0.8, 0.8, 'a'));
    expect(dragged.past).toHaveLength(1);
    const back = editElevation(dragged, { type: 'undone' });
    expect(back.draft).toBe(start.draft);
    expect(editElevation(back, { type: 'redone' }).draft).toEqual(dragged.draft);
    const again = editElevation(dragged, move(1, 0.9, 0.8, 'b'));
    expect(again.past).toHaveLength(2);
  });

  it('leaves no trace where it changed nothing', () => {
    expect(after(move(1, 0.5, 1))).toBe(start);
    expect(after({ type: 'undone' })).toBe(start);
    expect(after({ type: 'moved', curve: 'vigour', point: 0, height: 1, share: 1 })).toBe(start);
  });

  it('sets whole curves and the levels of the tide', () => {
    const curve: [number, number][] = [
      [0, 1],
      [1, 0],
    ];
    const set = after({ type: 'set', curves: { vigour: curve, capacity: null } });
    expect(set.draft.elevationCurves).toEqual({ capacity: null, vigour: curve, exposure: null });
    const datums = [{ name: 'mean sea level', height: 0 }];
    expect(after({ type: 'datums', datums }).draft.tidalDatums).toBe(datums);
  });
});
