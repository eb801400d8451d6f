import { useEffect, useEffectEvent, useMemo, useState } from 'react';
import { newWorkId, type Work } from '#contract/works.ts';
import type { GainMap } from '#sim-core/plan/gain-map.ts';
import type { Suggestion } from '#sim-core/plan/suggest.ts';
import type { QuickLookStart } from '#app/workers/quick-look-desk.ts';
import { startGainMap, startSuggest } from '#app/workers/suggest-client.ts';
import { plantedMound } from '../board/planted-mounds.ts';
import type { PenMound } from '../mound-pen.ts';
import { keepSuggestion, keptSuggestion, type KeptSuggestion } from './suggest-storage.ts';
import { readSuggest, startingSuggest, type SuggestPen } from './suggest-pen.ts';
import { usePlanJob, type PlanJob } from './use-plan-job.ts';

/** What a suggestion was asked for; the works of its places follow from it, whatever is typed meanwhile. */
type Asked = KeptSuggestion['asked'];

export interface Suggesting {
  readonly pen: SuggestPen;
  readonly setPen: (pen: SuggestPen) => void;
  /** what is wrong with what is typed, or with the mound that would be placed */
  readonly problem: string | undefined;
  readonly job: PlanJob<Found>;
  /** it was at work when the page was left, and began again by itself */
  readonly again: boolean;
  readonly gain: PlanJob<GainMap>;
  readonly suggest: () => void;
  readonly askGain: () => void;
  /** how many of the suggested mounds are taken, the first so many */
  readonly taken: number;
  readonly take: (count: number) => void;
  /** works of those that are taken */
  readonly works: readonly Work[];
  readonly forget: () => void;
}

/** Where, and where the curve of gains bends. */
type Found = { readonly footholds: Suggestion['footholds']; readonly knee?: number | undefined };
const noWorks: readonly Work[] = [];

/**
 * Places for more mounds, suggested for a drawing as it is. What was asked for outlives the page until it is taken or
 * dismissed: a finished suggestion comes back, one that was at work begins again with the same inputs.
 */
export function useSuggest(input: {
  optionId: string;
  /** undefined while the ground is not complete */
  start: QuickLookStart | undefined;
  drawn: readonly Work[];
  mound: PenMound | undefined;
  year: number | undefined;
  /** cost of one mound with its clumps */
  each: number | undefined;
}): Suggesting {
  const { optionId, start, drawn, mound, year, each } = input;
  const [kept] = useState(() => keptSuggestion(optionId));
  const [pen, setPen] = useState<SuggestPen>(kept?.pen ?? startingSuggest);
  const [asked, setAsked] = useState(kept?.asked);
  const [wanted, take] = useState(kept?.wanted);
  const [again, setAgain] = useState<'to begin' | 'begun' | undefined>(
    kept && !kept.result ? 'to begin' : undefined,
  );
  const job = usePlanJob<Found>(kept?.result);
  const gain = usePlanJob<GainMap>();
  const amount = readSuggest(pen, each);
  const problem =
    start === undefined
      ? 'It needs the ground: habitat with its classes, and cover.'
      : mound === undefined || year === undefined
        ? 'What a mound is, is typed wrong: choose Mounds above the map and mend its sentence.'
        : typeof amount === 'string'
          ? amount
          : undefined;
  const request = start &&
    mound &&
    year !== undefined && { start, works: drawn, foothold: { ...mound, year } };
  const footholds = job.result?.footholds;
  const taken = Math.min(footholds?.length ?? 0, wanted ?? Infinity);
  const works = useMemo(
    () =>
      footholds && asked
        ? footholds
            .slice(0, taken)
            .flatMap(({ x, y }) => plantedMound(newWorkId, asked.mound, { x, y, year: asked.year }))
        : noWorks,
    [footholds, asked, taken],
  );
  const begin = (what: Asked, from: QuickLookStart) => {
    const request = { start: from, works: drawn, foothold: { ...what.mound, year: what.year } };
    setAsked(what);
    job.start((onProgress) => startSuggest({ ...request, amount: what.amount }, onProgress));
  };
  const beginAgain = useEffectEvent((from: QuickLookStart) => {
    if (again !== 'to begin' || !asked) return;
    setAgain('begun');
    begin(asked, from);
  });
  useEffect(() => {
    if (!start) return;
    // In a turn of its own: it sets state, and a page that is gone at once must not begin anything.
    const turn = setTimeout(() => beginAgain(start));
    return () => clearTimeout(turn);
  }, [start]);
  const { running, result } = job;
  useEffect(() => {
    if (again === 'to begin') return;
    const stands = asked && (running || result);
    keepSuggestion(
      optionId,
      stands
        ? { pen, asked, wanted, result: result && { footholds: [...result.footholds], knee: result.knee } }
        : undefined,
    );
  }, [optionId, again, pen, asked, wanted, running, result]);
  return {
    again: again === 'begun',
    ...{ pen, setPen, problem, job, gain, taken, take, works },
    suggest: () => {
      if (!start || !mound || year === undefined || typeof amount === 'string') return;
      take(undefined);
      setAgain(undefined);
      begin({ mound, year, amount }, start);
    },
    askGain: () => {
      if (request) gain.start((onProgress) => startGainMap(request, onProgress));
    },
    forget: () => {
      job.cancel();
      take(undefined);
      // At once: the page may be left in the same breath.
      keepSuggestion(optionId, undefined);
    },
  };
}
