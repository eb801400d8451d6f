// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { GroundPoint } from '#app/map/rings.ts';
import { noSketch, sketchStep, type Sketch, type SketchEvent } from './sketch.ts';

const press = (x: number, y: number): SketchEvent => ({ type: 'press', at: [x, y], reach: 2 });
const draw = (closed: boolean, ...events: SketchEvent[]): Sketch =>
  events.reduce((sketch, event) => sketchStep(sketch, event, closed), noSketch);
const corners: GroundPoint[] = [
  [0, 0],
  [10, 0],
  [10, 10],
];

describe('an outline', () => {
  it('takes a point at every press, and closes on its first', () => {
    const open = draw(true, press(0, 0), press(10, 0), press(10, 10));
    expect([open.points, open.done]).toEqual([corners, false]);
    const closed = sketchStep(open, press(1, 1), true);
    expect([closed.points, closed.done]).toEqual([corners, true]);
    expect(sketchStep(closed, press(50, 50), true)).toBe(closed);
  });
  it('is finished by a double press on its last point, which adds none', () => {
    const twice = draw(true, press(0, 0), press(10, 0), press(10, 10), press(10, 10.5), { type: 'finish' });
    expect([twice.points, twice.done]).toEqual([corners, true]);
  });
  it('is not finished with two points, nor closed by a press on the first of them', () => {
    const two = draw(true, press(0, 0), press(10, 0), { type: 'finish' });
    expect([two.points.length, two.done]).toEqual([2, false]);
    expect(sketchStep(two, press(0.5, 0), true).points).toHaveLength(3);
  });
  it('is opened again, then takes its last point back, and is left as a whole', () => {
    const closed = draw(true, press(0, 0), press(10, 0), press(10, 10), { type: 'finish' });
    const open = sketchStep(closed, { type: 'back' }, true);
    expect([open.points, open.done]).toEqual([corners, false]);
    const back = sketchStep(open, { type: 'back' }, true);
    expect([back.points, back.done]).toEqual([corners.slice(0, 2), false]);
    expect(sketchStep(back, { type: 'clear' }, true)).toBe(noSketch);
    expect(sketchStep(noSketch, { type: 'back' }, true)).toBe(noSketch);
  });
});

it('a middle that is pulled becomes one corner, however often it is pulled', () => {
  const closed = draw(true, press(0, 0), press(10, 0), press(10, 10), { type: 'finish' });
  const pulls: SketchEvent[] = [
    { type: 'hold', hold: { kind: 'middle', index: 0 } },
    { type: 'pull', to: [5, -1] },
    { type: 'pull', to: [5, -3] },
    { type: 'hold', hold: undefined },
    { type: 'pull', to: [99, 99] },
  ];
  const pulled = pulls.reduce((sketch, event) => sketchStep(sketch, event, true), closed);
  expect([pulled.points, pulled.done]).toEqual([[corners[0], [5, -3], corners[1], corners[2]], true]);
});

it('a line is finished with two points, and does not close on its first', () => {
  const line = draw(false, press(0, 0), press(10, 0), press(0.5, 0));
  expect([line.points.length, line.done]).toEqual([3, false]);
  expect(draw(false, press(0, 0), press(10, 0), { type: 'finish' }).done).toBe(true);
});
