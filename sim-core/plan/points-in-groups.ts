import type { Point } from './extent.ts';
import type { OpenGround } from './open-ground.ts';
import { pointsApart } from './points-apart.ts';

export interface Groups {
  /** points in a group; the last one takes what is left */
  readonly each: number;
  /** metres from the group's middle to its outermost point, at most */
  readonly reach: number;
  /** metres between the middles of two groups, at least */
  readonly distance: number;
}

/** Places that are tried for a point before its group does without. */
const tries = 200;

/** `count` points in groups around middles that lie anywhere on the ground. */
export function pointsInGroups(
  ground: OpenGround,
  { each, reach, distance }: Groups,
  random: () => number,
  count: number,
): Point[] {
  const groups = Math.ceil(count / each);
  const middles: Point[] =
    distance > 0
      ? pointsApart(ground, distance, random, groups)
      : Array.from({ length: groups }, () => ground.anywhere(random)).filter((place) => place !== undefined);
  return middles.flatMap(([x, y], group) => {
    const points: Point[] = [];
    const wanted = Math.min(each, count - group * each);
    for (let i = 0; i < wanted; i++)
      for (let tried = 0; tried < tries; tried++) {
        const away = reach * Math.sqrt(random());
        const turn = 2 * Math.PI * random();
        const place: Point = [x + away * Math.cos(turn), y + away * Math.sin(turn)];
        if (!ground.isOpen(...place)) continue;
        points.push(place);
        break;
      }
    return points;
  });
}
