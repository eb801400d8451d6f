import { startingMound, type MoundPen } from '../mound-pen.ts';
import { startingArea, type AreaPen } from './area-pen.ts';
import { startingPatterns, type PatternPens } from './pattern-pen.ts';

/** All blanks of the sentences above the map; they stay as they were typed when the tool or the option changes. */
export interface BoardPens {
  /** of all works */
  readonly year: string;
  readonly mound: MoundPen;
  readonly area: AreaPen;
  readonly patterns: PatternPens;
  /** points of outlines and mounds keep to the cells */
  readonly snap: boolean;
}

/** What a page starts with: works in the first year that can be simulated. */
export const startingPens = (surveyYear: number): BoardPens => ({
  year: String(surveyYear + 1),
  mound: startingMound,
  area: startingArea,
  patterns: startingPatterns,
  snap: false,
});
