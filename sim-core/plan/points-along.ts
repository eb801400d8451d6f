import type { Point } from './extent.ts';
import type { OpenGround } from './open-ground.ts';

/** Points every `spacing` metres along each line from its first point on; those on open ground. */
export function pointsAlong(
  lines: readonly (readonly Point[])[],
  spacing: number,
  ground: Pick<OpenGround, 'isOpen'>,
): Point[] {
  const points: Point[] = [];
  for (const line of lines) {
    /** metres along the piece at hand to the next point */
    let ahead = 0;
    for (let i = 0; i + 1 < line.length; i++) {
      const [x, y] = line[i];
      const [nextX, nextY] = line[i + 1];
      const length = Math.hypot(nextX - x, nextY - y);
      // A hair more, so that the end of a line that is a whole number of spacings long counts.
      for (; ahead <= length * (1 + 1e-9); ahead += spacing) {
        const share = length > 0 ? Math.min(1, ahead / length) : 0;
        const place: Point = [x + share * (nextX - x), y + share * (nextY - y)];
        if (ground.isOpen(...place)) points.push(place);
      }
      ahead = Math.max(0, ahead - length);
    }
  }
  return points;
}

/** Length of a line, m. */
export const lineLength = (line: readonly Point[]): number =>
  line.slice(1).reduce((sum, [x, y], i) => sum + Math.hypot(x - line[i][0], y - line[i][1]), 0);
