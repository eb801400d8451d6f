import { stream } from '#sim-core/random/streams.ts';
import type { Point } from './extent.ts';
import { openGround, type OpenGroundInput } from './open-ground.ts';
import { lineLength, pointsAlong } from './points-along.ts';
import { pointsApart } from './points-apart.ts';
import { pointsInGroups } from './points-in-groups.ts';
import { pointsInRows } from './points-in-rows.ts';
import { standingEdge } from './standing-edge.ts';
import { widestSpacing } from './widest-spacing.ts';

/** So many points, or as many as a budget buys at `each` a point. */
export type PointNumber =
  | { readonly by: 'count'; readonly count: number }
  | { readonly by: 'budget'; readonly budget: number; readonly each: number };
/** … or so many a hectare of open ground. */
export type Amount = PointNumber | { readonly by: 'density'; readonly perHectare: number };
/** Metres from one point to the next. */
export type Spacing = { readonly by: 'spacing'; readonly spacing: number };

/** How points are laid over a polygon, or along a line. */
export type Pattern =
  /** anywhere, each without regard to the others; by spacing: as many as a square grid of it would have */
  | { readonly kind: 'scattered'; readonly amount: Amount | Spacing }
  /** anywhere, but never nearer to each other than `distance`, m; as many as fit unless said */
  | { readonly kind: 'apart'; readonly distance: number; readonly amount?: Amount }
  /** a square grid, its rows turned by `angle` degrees from east towards north */
  | { readonly kind: 'grid'; readonly angle: number; readonly amount: Amount | Spacing }
  /** groups of `each` points within `reach` metres of their middles, which are at least `distance` apart */
  | {
      readonly kind: 'groups';
      readonly each: number;
      readonly reach: number;
      readonly distance: number;
      /** of points, not of groups */
      readonly amount: Amount;
    }
  /** along the edge of what stands at the survey, `offset` metres outside it */
  | { readonly kind: 'edge'; readonly offset: number; readonly amount: PointNumber | Spacing }
  /** along a drawn line, from its first point on */
  | { readonly kind: 'line'; readonly line: readonly Point[]; readonly amount: PointNumber | Spacing };

export interface PatternInput extends OpenGroundInput {
  readonly pattern: Pattern;
  /** text from which every draw follows */
  readonly seed: string;
}

export interface LaidPoints {
  readonly points: Point[];
  /** how many were asked for; undefined where the pattern alone decides */
  readonly asked: number | undefined;
  /** m² of ground in the polygon on which points may stand */
  readonly openArea: number;
  /** why there are fewer points than were asked for, or none; undefined where all is as asked */
  readonly short: string | undefined;
}

/** Most points that one pattern may lay. */
export const mostPoints = 100_000;

/**
 * Lays points by a pattern, none outside the polygon or where works are not allowed or the plant cannot grow. The same
 * input gives the same points.
 *
 * @throws RangeError where a length or a number is not above 0, or where more than 100,000 points would be laid
 */
export function layPattern(input: PatternInput): LaidPoints {
  const { pattern, grid, seed } = input;
  refuseNonsense(pattern);
  const ground = openGround(input);
  const asked = askedFor(pattern, ground.area);
  refuseTooMany(asked ?? mostThatFit(pattern, ground.area));
  const points = ground.area > 0 ? lay() : [];
  return { points, asked, openArea: ground.area, short: shortOf(pattern, ground, points.length, asked) };

  function lay(): Point[] {
    const random = stream(seed, `pattern/${pattern.kind}`);
    switch (pattern.kind) {
      case 'scattered':
        return Array.from({ length: asked ?? 0 }, () => ground.anywhere(random)).filter(
          (place) => place !== undefined,
        );
      case 'apart':
        return pointsApart(ground, pattern.distance, random, asked);
      case 'groups':
        return pointsInGroups(ground, pattern, random, asked ?? 0);
      case 'grid':
        return spaced(
          pattern.amount,
          (n) => Math.sqrt(ground.area / n),
          4,
          (spacing) => pointsInRows(ground, spacing, pattern.angle),
        );
      case 'edge':
        return along(
          standingEdge(
            grid,
            input.cover ?? new Float32Array(grid.width * grid.height),
            pattern.offset,
            ground.box,
          ),
        );
      case 'line':
        return along([pattern.line]);
    }
    function along(lines: readonly (readonly Point[])[]): Point[] {
      const amount = (pattern as Extract<Pattern, { kind: 'edge' | 'line' }>).amount;
      const length = lines.reduce((sum, line) => sum + lineLength(line), 0);
      // Two points bound one spacing. Where little of the lines is open, the points stand up to 50 times closer.
      return spaced(
        amount,
        (n) => length / Math.max(1, n - 1),
        50,
        (spacing) => pointsAlong(lines, spacing, ground),
      );
    }
  }

  /**
   * Points at the spacing that was asked for; or at the usual one of as many as were, or else the widest that gives them.
   *
   * @param usual spacing of so many points, were all ground alike
   * @param closer how many times narrower than that it may become
   */
  function spaced(
    amount: Amount | Spacing,
    usual: (points: number) => number,
    closer: number,
    at: (spacing: number) => Point[],
  ): Point[] {
    if (amount.by === 'spacing') return at(amount.spacing);
    if (!asked || !(usual(asked) > 0)) return [];
    const first = at(usual(asked));
    if (first.length === asked) return first;
    return widestSpacing(at, asked, usual(asked) / closer, usual(asked) * 4);
  }
}

/** How many points a pattern asks for, undefined where its spacing decides. */
function askedFor(pattern: Pattern, openArea: number): number | undefined {
  const { amount } = pattern;
  if (amount === undefined) return undefined;
  switch (amount.by) {
    case 'count':
      return amount.count;
    case 'budget':
      // A hair more: what divides without a rest must not lose its last one to rounding.
      return Math.floor((amount.budget / amount.each) * (1 + 1e-12));
    case 'density':
      return Math.round((amount.perHectare * openArea) / 10_000);
    case 'spacing':
      return pattern.kind === 'scattered' ? Math.round(openArea / amount.spacing ** 2) : undefined;
  }
}

/** A bound on the points of a pattern whose spacing decides. */
function mostThatFit(pattern: Pattern, openArea: number): number {
  if (pattern.kind === 'apart') return openArea / (Math.sqrt(0.75) * pattern.distance ** 2);
  if (pattern.amount?.by !== 'spacing') return 0;
  if (pattern.kind === 'line') return lineLength(pattern.line) / pattern.amount.spacing;
  if (pattern.kind === 'grid') return openArea / pattern.amount.spacing ** 2;
  // Even an edge through every cell is no longer than that.
  return 0;
}

function refuseTooMany(points: number): void {
  if (points > mostPoints)
    throw new RangeError(
      `This would lay some ${Math.round(points).toLocaleString('en')} points; at most ` +
        `${mostPoints.toLocaleString('en')} can be laid at once. Ask for fewer, space them wider, or draw a smaller polygon.`,
    );
}

function refuseNonsense(pattern: Pattern): void {
  const positive = (name: string, value: number) => {
    if (!(value > 0 && value < Infinity))
      throw new RangeError(`Found ${name} ${value}; expected more than 0`);
  };
  const { amount } = pattern;
  if (pattern.kind === 'apart') positive('a distance of', pattern.distance);
  if (pattern.kind === 'groups') {
    positive('groups of', pattern.each);
    positive('a reach of', pattern.reach);
  }
  if (amount?.by === 'spacing') positive('a spacing of', amount.spacing);
  if (amount?.by === 'density') positive('points a hectare:', amount.perHectare);
  if (amount?.by === 'budget') positive('a cost for each point of', amount.each);
  if (amount?.by === 'count' && !(Number.isInteger(amount.count) && amount.count >= 0))
    throw new RangeError(`Found ${amount.count} points; expected a whole number`);
}

function shortOf(
  pattern: Pattern,
  ground: { readonly area: number },
  laid: number,
  asked: number | undefined,
): string | undefined {
  if (ground.area === 0)
    return 'No ground here can take works: they must stand where works are allowed and the plant can grow.';
  if (asked === 0) return 'This asks for no point: give more, or a larger budget.';
  if (asked === undefined ? laid > 0 : laid >= asked) return undefined;
  const fit = laid === 0 ? 'None fits' : `${laid} of ${asked} fit`;
  switch (pattern.kind) {
    case 'apart':
      return `${fit} at least ${pattern.distance} m apart.`;
    case 'groups':
      return `${fit}, in groups at least ${pattern.distance} m apart.`;
    case 'edge':
      return laid === 0
        ? `None fits: no edge of what stands comes within ${pattern.offset} m of ground that can take works here.`
        : `${fit} along the edge of what stands.`;
    case 'line':
      return `${fit} along this line: the rest of it lies where works are not allowed or the plant cannot grow.`;
    default:
      return `${fit} here.`;
  }
}
