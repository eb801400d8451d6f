/**
 * What a figure of a run is: of a map its covered area (m²), the border of what stands (m) and its reach, the mean
 * distance of what stands from what stood at the start (m); the covered area of a series (m²); the speed of a front (m/yr).
 */
export const figureKinds = ['map area', 'map edge', 'map reach', 'area', 'front'] as const;
export type FigureKind = (typeof figureKinds)[number];

/** A figure that runs of a fit are compared by. */
export interface Figure {
  readonly kind: FigureKind;
  /** the year that it is of; of a front the later one */
  readonly year: number;
  readonly observed: number;
  /** standard error; 0 of what is taken as exact */
  readonly error: number;
}
