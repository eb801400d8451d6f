/** Where everything stands in a yearline of a given width, CSS px. Years are points, not spans: bars stand on them. */
export interface YearlineScale {
  readonly width: number;
  readonly height: number;
  /** a phone: no margin for words, controls below */
  readonly compact: boolean;
  /** x of the survey year and of the last one */
  readonly left: number;
  readonly right: number;
  /** y of full cover, of the datum, and of the year labels */
  readonly top: number;
  readonly datum: number;
  readonly labels: number;
  readonly hang: number;
  /** width of one year */
  readonly yearWidth: number;
  /** the same, no wider than the margin leaves room for past the last year */
  readonly barWidth: number;
  x(year: number): number;
  /** y of a share of the reference cover */
  y(share: number): number;
  /** how far down a drought index hangs: the drier below 0, the further; from 0 on it is no drought and 0 */
  length(index: number): number;
  /** indices to write beside the bars: 0, −2, −4 …, as many as there is room for */
  readonly indexTicks: readonly number[];
  /** nearest year to an x, inside the yearline */
  yearAt(x: number): number;
}

interface ScaleInput {
  readonly width: number;
  readonly surveyYear: number;
  readonly lastYear: number;
  /** indices that must fit: the series and the tolerances */
  readonly indices: readonly number[];
  readonly highestShare: number;
}

/** The scale reaches at least this far, so that a mild record does not look like a drought. */
const leastDriest = -4;
/** Width below which the yearline is drawn as on a phone. */
export const compactBelow = 720;

export function yearlineScale({
  width,
  surveyYear,
  lastYear,
  indices,
  highestShare,
}: ScaleInput): YearlineScale {
  const compact = width < compactBelow;
  const shape = compact
    ? { left: 46, right: width - 24, top: 30, datum: 86, hang: 36, labels: 138, height: 144 }
    : { left: 196, right: width - 120, top: 30, datum: 104, hang: 44, labels: 165, height: 172 };
  const { left, right, top, datum, hang } = shape;
  const years = Math.max(1, lastYear - surveyYear);
  const yearWidth = (right - left) / years;
  const driest = Math.min(leastDriest, ...indices);
  const fullShare = Math.max(1, highestShare);
  return {
    width,
    compact,
    ...shape,
    yearWidth,
    barWidth: Math.min(yearWidth, 44),
    x: (year) => left + (year - surveyYear) * yearWidth,
    y: (share) => datum - (share / fullShare) * (datum - top),
    length: (index) => (Math.max(0, -index) / -driest) * hang,
    indexTicks: indexTicks(driest, hang),
    yearAt: (x) => Math.min(lastYear, Math.max(surveyYear, Math.round(surveyYear + (x - left) / yearWidth))),
  };
}

/** Room that a written index needs below the one before, px. */
const indexRoom = 13;

/** 0, −2, −4 … down to the driest index; in steps of 4, 10 or 20 where these would touch. */
function indexTicks(driest: number, hang: number): number[] {
  const step = [2, 4, 10, 20].find((by) => (by / -driest) * hang >= indexRoom) ?? 100;
  return Array.from({ length: Math.floor(-driest / step) + 1 }, (_, i) => (i === 0 ? 0 : -i * step));
}

/** Years to label: multiples of 1, 5, 10, 20 … that leave each label `room` px; the survey year where there is room. */
export function labelledYears(
  surveyYear: number,
  lastYear: number,
  yearWidth: number,
  room: number,
): number[] {
  const step = [1, 5, 10, 20, 50, 100, 200].find((s) => s * yearWidth >= room) ?? 500;
  const years: number[] = [];
  for (let y = Math.ceil(surveyYear / step) * step; y <= lastYear; y += step) years.push(y);
  if (!years.length || (years[0] - surveyYear) * yearWidth >= room) years.unshift(surveyYear);
  return years;
}

/** Of labels that start at `x` in px, those that can be written without running into the one before, or past `end`. */
export function labelsThatFit<T extends { x: number; label: string }>(
  labels: readonly T[],
  start: number,
  end: number,
): T[] {
  const width = (text: string) => text.length * 6.6 + 10;
  let free = start;
  return [...labels]
    .sort((a, b) => a.x - b.x)
    .filter((l) => {
      const fits = l.x >= free && l.x + width(l.label) <= end;
      if (fits) free = l.x + width(l.label);
      return fits;
    });
}
