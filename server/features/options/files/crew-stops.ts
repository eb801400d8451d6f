import { mostCrewPoints } from '#contract/option-files.ts';
import { workTitles } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import type { Point } from '#server/files/place-projection.ts';
import { shortRound } from './short-round.ts';

/** A place for a crew, in the order of visit. */
export interface CrewPoint {
  /** `007 Mound 12`: sorts in the order of visit */
  readonly name: string;
  /** what is done there */
  readonly task: string;
  readonly kind: Work['kind'];
  readonly year: number;
  /** in the site's CRS, m */
  readonly place: Point;
}

/** One stop of the round: a point, or the corners of an outline one after the other. */
interface Stop {
  readonly title: string;
  readonly task: string;
  readonly work: Work;
  readonly corners: readonly Point[];
}

/**
 * The points that a crew goes to: mounds, clumps point by point, the middle of discs, the corners of outlines; losses are
 * nobody's work. In the order of a short round over the stops; the corners of an outline stay together.
 *
 * @param works in the order of the option: they are called as on the page
 * @throws ProblemError `too-large` for more points than a crew can use
 */
export function crewPoints(
  works: readonly Work[],
  year: number | undefined,
  start: Point | undefined,
): CrewPoint[] {
  const titles = workTitles(works);
  const stops = works.flatMap((work) =>
    work.kind === 'loss' || (year !== undefined && work.year !== year)
      ? []
      : stopsOf(work, titles.get(work.id) ?? ''),
  );
  const count = stops.reduce((sum, stop) => sum + stop.corners.length, 0);
  if (count > mostCrewPoints)
    throw new ProblemError(
      'too-large',
      `Found ${count} points; a list for a crew holds at most ${mostCrewPoints}. Choose one year, or split the option; the GeoJSON holds all.`,
    );
  const digits = Math.max(3, String(count).length);
  let number = 0;
  return shortRound(
    stops.map((stop) => stop.corners[0]),
    start,
  ).flatMap((i) => {
    const { title, task, work, corners } = stops[i];
    return corners.map((place, corner) => {
      number++;
      const part = corners.length > 1 ? `, corner ${corner + 1} of ${corners.length}` : '';
      return {
        name: `${String(number).padStart(digits, '0')} ${title}${part}`,
        task,
        kind: work.kind,
        year: work.year,
        place,
      };
    });
  });
}

function stopsOf(work: Work, title: string): Stop[] {
  const task = taskOf(work);
  if (work.kind === 'mound') return [{ title, task, work, corners: [[work.x, work.y]] }];
  if (work.kind === 'clumps')
    return work.points.map((point, i) => ({
      title: work.points.length > 1 ? `${title}, point ${i + 1}` : title,
      task,
      work,
      corners: [point],
    }));
  const { area } = work;
  if (area.shape === 'disc') return [{ title, task, work, corners: [[area.x, area.y]] }];
  const holes = (area.holes ?? []).map((corners, i) => ({
    title: `${title}, hole ${i + 1}`,
    task: 'leave out what this outline holds',
    work,
    corners,
  }));
  return [{ title, task, work, corners: area.ring }, ...holes];
}

function taskOf(work: Work): string {
  const size =
    'area' in work
      ? work.area.shape === 'disc'
        ? `within ${metres(work.area.radius)}`
        : 'inside the outline'
      : '';
  switch (work.kind) {
    case 'mound':
      return `mound of ${metres(work.radius)} radius`;
    case 'clumps':
      return work.each === 1 ? 'set 1 clump' : `set ${work.each} clumps`;
    case 'planting':
      return `plant to ${percent(work.cover)} cover ${size}`;
    case 'fence':
      return `fence ${size}${work.until === undefined ? '' : `, until ${work.until}`}`;
    case 'loss':
      return `loss of ${percent(work.share)} ${size}`;
  }
}

const metres = (m: number) => `${Number(m.toFixed(2))} m`;
const percent = (share: number) => `${Number((100 * share).toFixed(1))} %`;
