/** Smallest of 1, 2, 5 × 10ⁿ that is at least `least`. */
export function niceStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  const factor = [1, 2, 5, 10].find((f) => f * power >= least * (1 - 1e-9)) ?? 10;
  return Number((factor * power).toPrecision(6));
}

export interface MapTick {
  /** easting or northing, m */
  readonly value: number;
  /** px from where the axis starts */
  readonly at: number;
  readonly labelled: boolean;
}

/**
 * Ticks of an edge that runs from `from` to `to` (m, either way) over `pixels`: labelled ones at a 1-2-5 step that
 * leaves each label `room` px, with unlabelled ones halfway.
 */
export function edgeTicks(from: number, to: number, pixels: number, room: number): MapTick[] {
  const perPixel = Math.abs(to - from) / pixels;
  const step = niceStep(Math.max(perPixel * room, 1e-6));
  const half = step / 2;
  const [low, high] = [Math.min(from, to), Math.max(from, to)];
  const ticks: MapTick[] = [];
  for (let k = Math.ceil(low / half); k * half <= high; k++) {
    const value = Number((k * half).toPrecision(12));
    ticks.push({ value, at: Math.abs(value - from) / perPixel, labelled: k % 2 === 0 });
  }
  return ticks;
}

export interface ScaleBar {
  /** length of the whole bar, m */
  readonly metres: number;
  readonly pixels: number;
  readonly unit: 'm' | 'km';
  /** numbers at its start, middle and end, in `unit` */
  readonly labels: readonly [string, string, string];
}

/** The longest 1-2-5 bar that fits into `room` px, at so many metres a px. */
export function scaleBar(metresPerPixel: number, room: number): ScaleBar {
  const most = metresPerPixel * room;
  const power = 10 ** Math.floor(Math.log10(most));
  const factor = [5, 2, 1].find((f) => f * power <= most * (1 + 1e-9)) ?? 1;
  const metres = Number((factor * power).toPrecision(6));
  const unit = metres >= 2000 ? 'km' : 'm';
  const say = (m: number) => String(Number((unit === 'km' ? m / 1000 : m).toPrecision(6)));
  return { metres, pixels: metres / metresPerPixel, unit, labels: ['0', say(metres / 2), say(metres)] };
}

/** An easting or northing as a survey sheet writes it: thousands apart by a no-break space. */
export const formatCoordinate = (metres: number): string =>
  String(Math.round(metres)).replace(/\B(?=(\d{3})+$)/g, '\u00a0');
