import type { Point } from './extent.ts';
import type { OpenGround } from './open-ground.ts';

/**
 * A square grid of points over the ground, row by row from one side to the other; the middle of the ground's box
 * lies between four of its points.
 *
 * @param spacing m
 * @param angle degrees that rows turn from east towards north
 */
export function pointsInRows(ground: OpenGround, spacing: number, angle: number): Point[] {
  const [west, south, east, north] = ground.box;
  const [midX, midY] = [(west + east) / 2, (south + north) / 2];
  const reach = Math.ceil(Math.hypot(east - west, north - south) / 2 / spacing);
  const [cos, sin] = [Math.cos((angle * Math.PI) / 180), Math.sin((angle * Math.PI) / 180)];
  const points: Point[] = [];
  for (let row = -reach - 0.5; row <= reach; row++)
    for (let column = -reach - 0.5; column <= reach; column++) {
      const x = midX + spacing * (column * cos - row * sin);
      const y = midY + spacing * (column * sin + row * cos);
      if (ground.isOpen(x, y)) points.push([x, y]);
    }
  return points;
}
