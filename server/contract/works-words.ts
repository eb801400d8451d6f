import type { Action, Area, Clumps, Mound } from '#sim-core/spec/run-spec.ts';
import { formatCounted, formatLength, formatShare } from './formats.ts';

const kinds: Record<Action['kind'], [one: string, many: string]> = {
  mound: ['mound', 'mounds'],
  planting: ['planting', 'plantings'],
  clumps: ['clump', 'clumps'],
  fence: ['fence', 'fences'],
  loss: ['one-off loss', 'one-off losses'],
};

/** What one of the works counts for: clumps one by one, all others as one. */
const countIn = (work: Action): number => (work.kind === 'clumps' ? clumpsIn(work) : 1);
const clumpsIn = ({ points, each }: Clumps): number => points.length * each;

const titles: Record<Action['kind'], string> = {
  mound: 'Mound',
  planting: 'Planting',
  clumps: 'Clumps',
  fence: 'Fence',
  loss: 'Loss',
};
/** What one of the works is called: its name, or what it is with its number (`workTitles`). */
export const titleOf = (work: Action & { name?: string | undefined }, number: number): string =>
  work.name ?? `${titles[work.kind]} ${number}`;

/** `22 mounds in 2027`, one entry for each kind and year, in order of years. */
export function worksByYear(
  works: readonly Action[],
): { year: number; kind: Action['kind']; count: number }[] {
  const groups = new Map<string, { year: number; kind: Action['kind']; count: number }>();
  for (const work of works) {
    const { kind, year } = work;
    const group = groups.get(`${year}/${kind}`) ?? { year, kind, count: 0 };
    groups.set(`${year}/${kind}`, { ...group, count: group.count + countIn(work) });
  }
  return [...groups.values()].sort((a, b) => a.year - b.year || a.kind.localeCompare(b.kind));
}

export const countOf = (kind: Action['kind'], count: number): string => formatCounted(count, ...kinds[kind]);

/** Works in one line: `40 mounds in 2027 and 2028; 3 plantings in 2027`. */
export function worksInWords(works: readonly Action[]): string {
  if (works.length === 0) return 'no works';
  return [...new Set(works.map((work) => work.kind))]
    .map((kind) => {
      const mine = works.filter((work) => work.kind === kind);
      const years = [...new Set(mine.map((work) => work.year))].sort((a, b) => a - b);
      const when =
        years.length <= 2 ? `in ${years.join(' and ')}` : `from ${years[0]} to ${years[years.length - 1]}`;
      const count = mine.reduce((sum, work) => sum + countIn(work), 0);
      return `${countOf(kind, count)} ${when}`;
    })
    .join('; ');
}

/** `3 m across, full strength, fading over 1 m` */
export function moundInWords({ radius, strength, halo }: Mound): string {
  const parts = [
    `${formatLength(2 * radius)} across`,
    strength === 1 ? 'full strength' : `${formatShare(strength)} strength`,
    halo > 0 && `fading over ${formatLength(halo)}`,
  ];
  return parts.filter(Boolean).join(', ');
}

/** What one of the works is. */
export function workInWords(action: Action): string {
  if (action.kind === 'mound') return moundInWords(action);
  if (action.kind === 'clumps')
    return `${countOf('clumps', clumpsIn(action))} at ${formatCounted(action.points.length, 'point')}`;
  const size = areaInWords(action.area);
  switch (action.kind) {
    case 'planting':
      return `planting to ${formatShare(action.cover)} cover, ${size}`;
    case 'fence':
      return `fence at ${formatShare(action.strength)}, ${size}${action.until === undefined ? '' : `, until ${action.until}`}`;
    case 'loss':
      return `loss of ${formatShare(action.share)}, ${size}`;
  }
}

const areaInWords = (area: Area): string =>
  area.shape === 'disc'
    ? `${formatLength(2 * area.radius)} across`
    : `outline of ${area.ring.length} points${holesInWords(area)}`;

/** ` with 2 holes`, or nothing. */
export const holesInWords = (area: Area): string =>
  area.shape === 'polygon' && area.holes ? ` with ${formatCounted(area.holes.length, 'hole')}` : '';

/** Where one of the works stands: its centre, or the middle of its outline or points, m. */
export function placeOf(action: Action): { x: number; y: number } {
  if (action.kind === 'mound') return action;
  if (action.kind === 'clumps') return middleOf(action.points);
  return action.area.shape === 'disc' ? action.area : middleOf(action.area.ring);
}

function middleOf(points: readonly [number, number][]): { x: number; y: number } {
  const mean = (of: 0 | 1) => points.reduce((sum, point) => sum + point[of], 0) / points.length;
  return { x: mean(0), y: mean(1) };
}

const coordinate = new Intl.NumberFormat('en-GB', { maximumFractionDigits: 1 });

/** `E 412 355 N 5 301 925`, to the decimetre where they are no whole metres. */
export function placeInWords({ x, y }: { x: number; y: number }): string {
  const say = (metres: number) => coordinate.format(metres).replaceAll(',', '\u2009');
  return `E ${say(x)} N ${say(y)}`;
}
