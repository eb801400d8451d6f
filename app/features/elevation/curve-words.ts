import type { ElevationCurve } from '#contract/layers.ts';
import { formatNumber, formatShare } from '#app/lib/formats.ts';
import type { CurveName } from './curve-draft.ts';

/** What a curve stands for, where it is chosen. */
export const curveMeanings: Record<CurveName, string> = {
  capacity: 'What the class of a cell can hold is multiplied by this share.',
  vigour: 'The vigour of a cell’s class is multiplied by this share.',
  exposure: 'This share is the chronic stress of the cell; an exposure layer counts where it is higher.',
};

/** How each curve is drawn; in words and in dashes, never by colour alone. */
export const curveDashes: Record<CurveName, string | undefined> = {
  capacity: undefined,
  vigour: '7 3',
  exposure: '1.5 3',
};

export const metres = (height: number) => `${formatNumber(height)} m`;

/** A curve in a sentence. */
export function curveInWords(name: CurveName, curve: ElevationCurve): string {
  const [first, ...rest] = curve;
  const last = rest.at(-1) ?? first;
  const between = rest.slice(0, -1).map(([height, share]) => `${formatShare(share)} at ${metres(height)}`);
  const parts = [
    `${formatShare(first[1])} up to ${metres(first[0])}`,
    ...between,
    `${formatShare(last[1])} from ${metres(last[0])} up`,
  ];
  return `${name[0].toUpperCase()}${name.slice(1)}: ${parts.join(', ')}.`;
}
