import type { ElevationCurve, ElevationCurves, TidalDatum } from '#contract/layers.ts';
import { curvePoints } from '#sim-core/spec/layer-source.ts';

export const curveNames = ['capacity', 'vigour', 'exposure'] as const;
export type CurveName = (typeof curveNames)[number];

/** Curves and levels of the tide while they are edited. */
export interface ElevationDraft {
  readonly elevationCurves: ElevationCurves;
  readonly tidalDatums: readonly TidalDatum[];
}

/** The draft with its past, so that every deed can be taken back. */
export interface ElevationEditing {
  readonly draft: ElevationDraft;
  readonly past: readonly ElevationDraft[];
  readonly future: readonly ElevationDraft[];
  /** what the latest deed was part of: a drag is one deed, however many moves it had */
  readonly gesture: string | undefined;
}

export type ElevationEvent =
  | { type: 'moved'; curve: CurveName; point: number; height: number; share: number; gesture?: string }
  | { type: 'added'; curve: CurveName; height: number; share: number }
  | { type: 'removed'; curve: CurveName; point: number }
  /** a curve as a whole, or none */
  | { type: 'set'; curves: Partial<ElevationCurves> }
  | { type: 'datums'; datums: readonly TidalDatum[]; gesture?: string }
  | { type: 'undone' }
  | { type: 'redone' };

/** Heights to the centimetre, shares to the hundredth: finer than a tide or a survey. */
const hundredths = (value: number) => Math.round(value * 100) / 100;
/** Least distance between two points, m. */
const apart = 0.01;
const mostUndone = 100;

export const startEditing = (draft: ElevationDraft): ElevationEditing => ({
  draft,
  past: [],
  future: [],
  gesture: undefined,
});

/** What a deed makes of the draft. A deed that changes nothing leaves no trace in the past. */
export function editElevation(editing: ElevationEditing, event: ElevationEvent): ElevationEditing {
  const { draft, past, future } = editing;
  if (event.type === 'undone') {
    const before = past.at(-1);
    return before
      ? { draft: before, past: past.slice(0, -1), future: [draft, ...future], gesture: undefined }
      : editing;
  }
  if (event.type === 'redone') {
    const [after, ...rest] = future;
    return after ? { draft: after, past: [...past, draft], future: rest, gesture: undefined } : editing;
  }
  const next = changed(draft, event);
  if (next === draft) return editing;
  const gesture = 'gesture' in event ? event.gesture : undefined;
  const goesOn = gesture !== undefined && gesture === editing.gesture;
  return { draft: next, past: goesOn ? past : [...past, draft].slice(-mostUndone), future: [], gesture };
}

function changed(
  draft: ElevationDraft,
  event: Exclude<ElevationEvent, { type: 'undone' | 'redone' }>,
): ElevationDraft {
  if (event.type === 'datums') return { ...draft, tidalDatums: event.datums };
  if (event.type === 'set')
    return { ...draft, elevationCurves: { ...draft.elevationCurves, ...event.curves } };
  const curve = draft.elevationCurves[event.curve];
  if (!curve) return draft;
  const next = changedCurve(curve, event);
  return next === curve
    ? draft
    : { ...draft, elevationCurves: { ...draft.elevationCurves, [event.curve]: next } };
}

function changedCurve(
  curve: ElevationCurve,
  event: Extract<ElevationEvent, { type: 'moved' | 'added' | 'removed' }>,
): ElevationCurve {
  if (event.type === 'removed')
    return curve.length > curvePoints.least ? curve.filter((_, i) => i !== event.point) : curve;
  const share = Math.min(1, Math.max(0, hundredths(event.share)));
  const height = hundredths(event.height);
  if (event.type === 'added') {
    const taken = curve.some(([z]) => Math.abs(z - height) < apart / 2);
    if (taken || curve.length >= curvePoints.most) return curve;
    return [...curve, [height, share] as [number, number]].sort(([a], [b]) => a - b);
  }
  // A point never passes its neighbours: which of them is dragged would no longer be clear.
  const least = event.point > 0 ? hundredths(curve[event.point - 1][0] + apart) : -Infinity;
  const most = event.point < curve.length - 1 ? hundredths(curve[event.point + 1][0] - apart) : Infinity;
  const kept = Math.min(most, Math.max(least, height));
  const [was, stood] = curve[event.point];
  if (was === kept && stood === share) return curve;
  return curve.map((point, i) => (i === event.point ? [kept, share] : point));
}
