import type { Curve } from '#sim-core/spec/layer-source.ts';

/** Share at a value: straight between the points of the curve, constant beyond the first and the last. */
export function curveShare(curve: Curve, value: number): number {
  const [first] = curve;
  if (value <= first[0]) return first[1];
  for (let i = 1; i < curve.length; i++) {
    const [right, above] = curve[i];
    if (value > right) continue;
    const [left, below] = curve[i - 1];
    return below + (above - below) * ((value - left) / (right - left));
  }
  return curve[curve.length - 1][1];
}
