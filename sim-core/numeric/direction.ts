/**
 * Unit vector at a share of a whole turn from the first axis towards the second, the same bits on every machine
 * (`Math.sin` and `Math.cos` may differ between engines). By eighths of a turn, so that the angle left lies within
 * ±π/4, where the polynomials of Sun Microsystems' fdlibm 5.3, `k_sin.c` and `k_cos.c` (1993), are within 1 ulp.
 *
 * @param turn 0 to 1
 */
export function direction(turn: number): { readonly x: number; readonly y: number } {
  const quarter = Math.floor(turn * 4 + 0.5);
  // Exact: both lie within a factor of two of each other or the difference is the number itself.
  const angle = (turn * 4 - quarter) * (Math.PI / 2);
  const square = angle * angle;
  const sine =
    angle +
    angle * square * (s1 + square * (s2 + square * (s3 + square * (s4 + square * (s5 + square * s6)))));
  const cosine =
    1 -
    (0.5 * square -
      square * square * (c1 + square * (c2 + square * (c3 + square * (c4 + square * (c5 + square * c6))))));
  switch (quarter % 4) {
    case 0:
      return { x: cosine, y: sine };
    case 1:
      return { x: -sine, y: cosine };
    case 2:
      return { x: -cosine, y: -sine };
    default:
      return { x: sine, y: -cosine };
  }
}

const s1 = -1.66666666666666324348e-1;
const s2 = 8.33333333332248946124e-3;
const s3 = -1.98412698298579493134e-4;
const s4 = 2.75573137070700676789e-6;
const s5 = -2.50507602534068634195e-8;
const s6 = 1.58969099521155010221e-10;
const c1 = 4.16666666666666019037e-2;
const c2 = -1.38888888888741095749e-3;
const c3 = 2.48015872894767294178e-5;
const c4 = -2.75573143513906633035e-7;
const c5 = 2.0875723212981748279e-9;
const c6 = -1.13596475577881948265e-11;
