import type { YearLine } from '#sim-core/plan/year-lines.ts';
import type { MapContour } from '#app/map/paint-overlay.ts';
import type { GroundPoint } from '#app/map/rings.ts';

/** Points of a line that is worth a year of its own, and from one label on it to the next. */
const worth = 48;
const between = 160;

/** Lines of closing years as the map paints them, with their years along them, to be read from below. */
export const yearContours = (lines: readonly YearLine[]): MapContour[] =>
  lines.map(({ year, lines: pieces }) => ({
    words: String(year),
    lines: pieces,
    labels: pieces.flatMap((piece) => labelsOf(piece)),
  }));

function labelsOf(piece: readonly GroundPoint[]): MapContour['labels'] {
  if (piece.length < worth) return [];
  const count = Math.max(1, Math.floor(piece.length / between));
  return Array.from({ length: count }, (_, i) => {
    const at = Math.floor(((i + 0.5) * piece.length) / count);
    const [x, y] = piece[at];
    const from = piece[Math.max(0, at - 2)];
    const to = piece[Math.min(piece.length - 1, at + 2)];
    // North is up on the ground and down on the screen.
    return { x, y, angle: upright(-Math.atan2(to[1] - from[1], to[0] - from[0])) };
  });
}

/** An angle on the screen, turned by half a turn where words along it would stand on their head. */
function upright(angle: number): number {
  const turned = ((angle % Math.PI) + Math.PI) % Math.PI;
  return turned > Math.PI / 2 ? turned - Math.PI : turned;
}
