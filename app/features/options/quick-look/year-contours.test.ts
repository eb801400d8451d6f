// @vitest-environment node
import { expect, it } from 'vitest';
import type { GroundPoint } from '#app/map/rings.ts';
import { yearContours } from './year-contours.ts';

/** A straight line from a point, by so many steps of a metre at an angle from east. */
const straight = (angle: number, steps: number): GroundPoint[] =>
  Array.from({ length: steps }, (_, i) => [i * Math.cos(angle), i * Math.sin(angle)]);
const labels = (...lines: GroundPoint[][]) =>
  yearContours([{ year: 2035, lines, label: undefined }])[0].labels;

it('writes years along their lines, never on their head', () => {
  for (const angle of [0, 0.5, 1.5, 2, 3, -1, -3]) {
    const [label] = labels(straight(angle, 60));
    expect(Math.abs(label.angle ?? 9)).toBeLessThanOrEqual(Math.PI / 2 + 1e-9);
    // Along the line, with north up on the ground and down on the screen.
    expect(Math.abs(Math.sin((label.angle ?? 9) + angle))).toBeLessThan(1e-9);
  }
});

it('writes none on a line too short for it, and several on a long one', () => {
  expect(labels(straight(0, 40))).toEqual([]);
  expect(labels(straight(0, 60), straight(1, 500))).toHaveLength(4);
});
